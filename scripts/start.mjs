// Runs the whole demo shop on this machine: PostgreSQL, the Stripe fake, the mail inbox and the app, until Ctrl-C.
// Usage: npm start    (PORT=<port> moves it; see lib/ports.mjs for the ports of the others)
import { buildAnnouncement, readDemoSignIns } from './lib/announcement.mjs'
import { takeLock } from './lib/lock-file.mjs'
import { readServicePorts } from './lib/ports.mjs'
import { Processes } from './lib/processes.mjs'
import { START_LOCK, assertNodeVersion, makeDataFolder } from './lib/project.mjs'
import { PlainError, describeFailure, readLogTail, say } from './lib/say.mjs'
import { RECORD_FILE, startShop } from './lib/start-shop.mjs'
import { onStopRequest } from './lib/stop-requests.mjs'

/** @typedef {{ name: string, how: string, logFile: string }} DeadPart */

async function main() {
  assertNodeVersion()
  const ports = readServicePorts(process.env)
  makeDataFolder()
  const lock = takeLock(START_LOCK, `http://127.0.0.1:${ports.app}`)
  if (!lock.taken) {
    throw new PlainError(`Wirewright already runs from this folder (process ${lock.holder.pid}, ${lock.holder.note}). Use that one, or stop it first.`)
  }
  try {
    await runUntilStopped(ports)
  } finally {
    lock.release()
  }
}

/**
 * Starts everything, then waits for Ctrl-C or the death of a part, and in every case stops what was started.
 * @param {import('./lib/ports.mjs').ServicePorts} ports
 */
async function runUntilStopped(ports) {
  const stopping = new AbortController()
  /** @type {(deadPart: DeadPart | null) => void} */
  let end = () => {}
  /** @type {Promise<DeadPart | null>} */
  const ended = new Promise((resolve) => (end = resolve))
  onStopRequest(() => end(null))
  const processes = new Processes({ recordFile: RECORD_FILE, onUnexpectedExit: (name, how, logFile) => end({ name, how, logFile }) })
  const started = startShop(ports, processes, stopping.signal)
  try {
    const surroundings = await Promise.race([started, ended])
    if (surroundings && 'ports' in surroundings) say(buildAnnouncement(surroundings, readDemoSignIns(surroundings.demoSignInsFile)))
    const deadPart = await ended
    if (deadPart) throw new PlainError(await describeDeath(deadPart))
    say('\nStopping everything ...')
  } finally {
    stopping.abort()
    await processes.stopAll()
    await started.catch(() => {})
  }
  say('Stopped.')
}

/** @param {DeadPart} part */
async function describeDeath({ name, how, logFile }) {
  return `\nStopped unexpectedly: ${name} (${how}). Everything else is stopped too. The end of ${logFile}:\n\n${await readLogTail(logFile)}\n`
}

try {
  await main()
} catch (failure) {
  console.error(describeFailure(failure))
  process.exitCode = 1
}
