const STOP_SIGNALS = /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])
const PARENT_CHECK_MS = 250

/**
 * Calls back, once or more, when somebody wants this program to end: by Ctrl-C, by a signal, or by ending the `npm` that
 * runs it. npm passes a signal on to its shell only, which would leave us behind without an owner.
 * @param {() => void} stop
 */
export function onStopRequest(stop) {
  for (const signal of STOP_SIGNALS) process.on(signal, stop)
  if (!process.env.npm_lifecycle_event) return
  const parent = process.ppid
  setInterval(() => process.ppid !== parent && stop(), PARENT_CHECK_MS).unref()
}
