import { fork } from 'node:child_process'
import { once } from 'node:events'
import { fileURLToPath } from 'node:url'
import type { TestServices } from '../../scripts/lib/test-shop.mjs'

type Report = { services: TestServices } | { failure: string }

/**
 * Starts the throw-away services in a process of their own, which ends with this one however this one ends.
 * @throws Error with the reason when they cannot be started
 */
export async function launchTestServices(suite: 'api' | 'e2e'): Promise<{ services: TestServices, stop: () => Promise<void> }> {
  const host = fork(fileURLToPath(new URL('../../scripts/test-services.mjs', import.meta.url)), [suite], {
    // Out of the terminal's process group: on Ctrl-C the tests end first, then the services.
    detached: true,
    execArgv: [],
  })
  const exited = once(host, 'exit')
  const report = await Promise.race([
    once(host, 'message').then(([message]) => message as Report),
    exited.then((): Report => ({ failure: 'The process that holds the test services ended before they were ready.' })),
  ])
  if ('failure' in report) {
    await exited
    throw new Error(report.failure)
  }
  return {
    services: report.services,
    stop: async () => {
      if (host.connected) host.disconnect()
      await exited
    },
  }
}
