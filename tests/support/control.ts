import type { ServiceName } from '../../scripts/lib/services.mjs'
import type { TestServices } from '../../scripts/lib/test-shop.mjs'

/** Starts and stops one service of the run; every call answers when it is done. */
export type ServiceControl = {
  /** Does nothing when it runs already. For the two app processes: settings that differ, as environment variables. */
  start: (env?: Record<string, string>) => Promise<void>
  /** Asks it to end and waits. */
  stop: () => Promise<void>
  /** kill -9; the database as in a power cut. */
  kill: () => Promise<void>
  restart: (env?: Record<string, string>) => Promise<void>
}

export type ServicesControl = Record<'app' | 'secondApp' | 'stripeFake' | 'mail' | 'database', ServiceControl>

/** The remote control of the services, for tests about faults. A test puts back what it stopped. */
export function connectControl({ controlUrl, controlToken }: Pick<TestServices, 'controlUrl' | 'controlToken'>): ServicesControl {
  const control = (name: ServiceName): ServiceControl => {
    const act = async (action: keyof ServiceControl, env?: Record<string, string>): Promise<void> => {
      const response = await fetch(`${controlUrl}/${name}/${action}`, {
        method: 'POST',
        headers: { authorization: `Bearer ${controlToken}` },
        body: env && JSON.stringify(env),
      })
      if (!response.ok) throw new Error(`${action} of ${name} failed: ${await response.text()}`)
    }
    return { start: env => act('start', env), stop: () => act('stop'), kill: () => act('kill'), restart: env => act('restart', env) }
  }
  return { app: control('app'), secondApp: control('second-app'), stripeFake: control('stripe-fake'), mail: control('mail'), database: control('database') }
}
