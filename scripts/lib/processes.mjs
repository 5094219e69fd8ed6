import { spawn } from 'node:child_process'
import { closeSync, openSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { identifyProcess, isStillRunning, waitUntilGone } from './process-identity.mjs'
import { PROJECT_FOLDER } from './project.mjs'
import { PlainError, say } from './say.mjs'

/**
 * @typedef {object} ProcessSettings
 * @property {string} name what to call it in messages: 'the app'
 * @property {string} command
 * @property {readonly string[]} args
 * @property {NodeJS.ProcessEnv} env its whole environment
 * @property {string} logFile
 * @property {NodeJS.Signals} [stopSignal]
 * @property {number} [stopTimeoutMs] after that it is killed
 * @property {string} [cwd]
 * @property {number} [uid]
 * @property {number} [gid]
 *
 * @typedef {object} ManagedProcess
 * @property {string} name
 * @property {number} pid
 * @property {string} logFile
 * @property {() => boolean} hasExited
 * @property {() => Promise<void>} stop asks it to end, waits, and kills it when its time is over
 * @property {() => Promise<void>} kill kill -9, and waits until it is gone
 *
 * @typedef {{ name: string, stopSignal: NodeJS.Signals } & import('./process-identity.mjs').ProcessIdentity} RecordedProcess
 */

const STOP_TIMEOUT_MS = 10_000

/** The processes somebody started: each in a group of its own, so that Ctrl-C in a terminal reaches the launcher only. */
export class Processes {
  /** @type {Array<ManagedProcess & { stopSignal: NodeJS.Signals }>} */
  #running = []
  #isClosed = false
  #recordFile
  #onUnexpectedExit

  /**
   * @param {object} options
   * @param {string} options.recordFile names what runs, for the next start to find should this program be killed
   * @param {(name: string, how: string, logFile: string) => void} options.onUnexpectedExit
   */
  constructor({ recordFile, onUnexpectedExit }) {
    this.#recordFile = recordFile
    this.#onUnexpectedExit = onUnexpectedExit
  }

  /**
   * @param {ProcessSettings} settings
   * @returns {ManagedProcess}
   */
  start({ name, command, args, env, logFile, stopSignal = 'SIGTERM', stopTimeoutMs = STOP_TIMEOUT_MS, cwd = PROJECT_FOLDER, ...user }) {
    if (this.#isClosed) throw new PlainError(`${name} is not started: everything is being stopped.`)
    keepPreviousLog(logFile)
    const log = openSync(logFile, 'a', 0o600)
    const child = spawn(command, args, { env, cwd, detached: true, stdio: ['ignore', log, log], ...user })
    closeSync(log)
    const pid = child.pid
    let isExpected = false
    let hasExited = false
    const exited = new Promise((resolve) => {
      /** @param {string} how */
      const noteExit = (how) => {
        if (hasExited) return
        hasExited = true
        this.#forget(managed)
        resolve(undefined)
        if (!isExpected) this.#onUnexpectedExit(name, how, logFile)
      }
      child.once('error', (error) => noteExit(error.message))
      child.once('exit', (code, signal) => noteExit(signal ? `ended by ${signal}` : `exit code ${code}`))
    })
    const managed = {
      name,
      pid: pid ?? 0,
      logFile,
      stopSignal,
      hasExited: () => hasExited,
      stop: async () => {
        isExpected = true
        if (!hasExited) signalProcess(pid, stopSignal)
        const timer = setTimeout(() => signalGroup(pid, 'SIGKILL'), stopTimeoutMs)
        await exited
        clearTimeout(timer)
        signalGroup(pid, 'SIGKILL')
      },
      kill: async () => {
        isExpected = true
        signalGroup(pid, 'SIGKILL')
        await exited
      },
    }
    this.#running.push(managed)
    this.#writeRecord()
    return managed
  }

  /** Stops all of them, the last started first, and starts none any more. */
  async stopAll() {
    this.#isClosed = true
    for (const managed of [...this.#running].reverse()) await managed.stop()
    rmSync(this.#recordFile, { force: true })
  }

  /** @param {ManagedProcess} managed */
  #forget(managed) {
    this.#running = this.#running.filter((other) => other !== managed)
    this.#writeRecord()
  }

  #writeRecord() {
    const record = this.#running.map(({ name, pid, stopSignal }) => ({ name, stopSignal, ...identifyProcess(pid) }))
    writeFileSync(this.#recordFile, JSON.stringify(record), { mode: 0o600 })
  }
}

/**
 * Ends what an earlier launcher left running when it was itself killed: the recorded processes, if they still are the same ones.
 * @param {string} recordFile
 */
export async function stopForgottenProcesses(recordFile) {
  /** @type {RecordedProcess[]} */
  let recorded = []
  try {
    recorded = JSON.parse(readFileSync(recordFile, 'utf8'))
  } catch {
    return
  }
  for (const forgotten of recorded.reverse()) {
    if (!isStillRunning(forgotten)) continue
    say(`An earlier start was killed and left ${forgotten.name} running: stopping it.`)
    signalProcess(forgotten.pid, forgotten.stopSignal)
    if (await waitUntilGone(forgotten.pid, STOP_TIMEOUT_MS)) continue
    signalGroup(forgotten.pid, 'SIGKILL')
    if (!(await waitUntilGone(forgotten.pid, STOP_TIMEOUT_MS))) throw new PlainError(`Process ${forgotten.pid} (${forgotten.name}) of an earlier start cannot be stopped.`)
  }
  rmSync(recordFile, { force: true })
}

/**
 * @param {number | undefined} pid
 * @param {NodeJS.Signals} signal
 */
function signalProcess(pid, signal) {
  if (pid) ignoreAbsence(() => process.kill(pid, signal))
}

/**
 * The process with everything it started itself.
 * @param {number | undefined} pid
 * @param {NodeJS.Signals} signal
 */
function signalGroup(pid, signal) {
  if (pid) ignoreAbsence(() => process.kill(-pid, signal))
}

/** @param {() => void} action */
function ignoreAbsence(action) {
  try {
    action()
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'ESRCH')) throw error
  }
}

/** @param {string} logFile */
function keepPreviousLog(logFile) {
  try {
    renameSync(logFile, `${logFile}.previous`)
  } catch {
    // The first start: there is no log yet.
  }
}
