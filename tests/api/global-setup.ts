import type { TestProject } from 'vitest/node'
import type { TestServices } from '../../scripts/lib/test-shop.mjs'
import { launchTestServices } from '../support/launch'

declare module 'vitest' {
  export interface ProvidedContext extends TestServices {}
}

/** Starts PostgreSQL, the Stripe fake, the mail inbox and the built app, and provides their addresses to `inject`. */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  const { services, stop } = await launchTestServices('api')
  for (const [name, value] of Object.entries(services)) project.provide(name as keyof TestServices, value)
  return stop
}
