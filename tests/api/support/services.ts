import { inject } from 'vitest'
import { connectControl, type ServicesControl } from '../../support/control'

/** Stops, kills and starts the services of this run: `await useServices().mail.stop()`. */
export function useServices(): ServicesControl {
  return connectControl({ controlUrl: inject('controlUrl'), controlToken: inject('controlToken') })
}
