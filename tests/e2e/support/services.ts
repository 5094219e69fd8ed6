import type { TestServices } from '../../../scripts/lib/test-shop.mjs'
import { connectControl, type ServicesControl } from '../../support/control'

/** The set-up hands the addresses to the workers through this environment variable. */
export const SERVICES_VARIABLE = 'WIREWRIGHT_TEST_SERVICES'

/** Addresses and sign-ins of the services of this run. */
export function useTestServices(): TestServices {
  const text = process.env[SERVICES_VARIABLE]
  if (!text) throw new Error('The services are not started: run the browser tests through playwright.config.ts.')
  return JSON.parse(text) as TestServices
}

/** Stops, kills and starts the services of this run. */
export function useServices(): ServicesControl {
  return connectControl(useTestServices())
}
