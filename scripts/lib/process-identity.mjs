import { readFileSync } from 'node:fs'

/**
 * @typedef {object} ProcessIdentity
 * @property {number} pid
 * @property {string | null} startedAtTicks the kernel's start time of the process; null where /proc does not exist
 */

/**
 * Who a process is. A number alone is not enough: after a crash the system may have given it to another program.
 * @param {number} pid
 * @returns {ProcessIdentity}
 */
export function identifyProcess(pid) {
  return { pid, startedAtTicks: readStartTicks(pid) }
}

/**
 * Whether the process that was once recorded is still the one running under its number.
 * @param {ProcessIdentity} identity
 */
export function isStillRunning({ pid, startedAtTicks }) {
  if (!isAlive(pid)) return false
  return startedAtTicks === null || readStartTicks(pid) === startedAtTicks
}

/**
 * @param {number} pid
 */
export function isAlive(pid) {
  try {
    process.kill(pid, 0)
  } catch (error) {
    return error instanceof Error && 'code' in error && error.code === 'EPERM'
  }
  return readState(pid) !== 'Z'
}

/**
 * Waits until the process is gone; answers false when the time is over first.
 * @param {number} pid
 * @param {number} timeoutMs
 */
export async function waitUntilGone(pid, timeoutMs) {
  const deadline = Date.now() + timeoutMs
  while (isAlive(pid)) {
    if (Date.now() > deadline) return false
    await new Promise((resolve) => setTimeout(resolve, 25))
  }
  return true
}

/**
 * Fields of /proc/<pid>/stat after the command name, which may itself hold spaces and brackets.
 * @param {number} pid
 * @returns {string[]}
 */
function readStatFields(pid) {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, 'utf8')
    return text.slice(text.lastIndexOf(')') + 2).split(' ')
  } catch {
    return []
  }
}

/** @param {number} pid */
function readState(pid) {
  return readStatFields(pid)[0]
}

/** @param {number} pid */
function readStartTicks(pid) {
  // Field 22 of proc(5), counted from 1; the list starts at field 3.
  return readStatFields(pid)[19] ?? null
}

/**
 * Processes started by this one, directly.
 * @param {number} pid
 * @returns {number[]}
 */
export function listChildPids(pid) {
  try {
    return readFileSync(`/proc/${pid}/task/${pid}/children`, 'utf8').trim().split(' ').filter(Boolean).map(Number)
  } catch {
    return []
  }
}
