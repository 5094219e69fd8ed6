import { launchTestServices } from '../support/launch'
import { SERVICES_VARIABLE } from './support/services'

/** Starts the same services as the API tests; the browser tests read their addresses with `useTestServices`. */
export default async function setUp(): Promise<() => Promise<void>> {
  const { services, stop } = await launchTestServices('e2e')
  process.env[SERVICES_VARIABLE] = JSON.stringify(services)
  return stop
}
