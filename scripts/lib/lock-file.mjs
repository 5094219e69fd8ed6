import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { identifyProcess, isStillRunning } from './process-identity.mjs'

/**
 * @typedef {import('./process-identity.mjs').ProcessIdentity} ProcessIdentity
 * @typedef {ProcessIdentity & { note: string }} LockHolder
 * @typedef {{ taken: true, release: () => void } | { taken: false, holder: LockHolder }} LockResult
 */

/**
 * Takes a lock file, or tells who holds it. A file left behind by a process that died is replaced.
 * @param {string} path
 * @param {string} note kept in the file for whoever finds it taken, for example the address of the app
 * @returns {LockResult}
 */
export function takeLock(path, note) {
  const own = `${path}.${process.pid}`
  writeFileSync(own, JSON.stringify({ ...identifyProcess(process.pid), note }), { mode: 0o600 })
  try {
    for (;;) {
      if (linkIfAbsent(own, path)) return { taken: true, release: () => releaseLock(path) }
      const holder = readLockHolder(path)
      if (holder && isStillRunning(holder)) return { taken: false, holder }
      removeStaleLock(path, holder)
    }
  } finally {
    rmSync(own, { force: true })
  }
}

/**
 * Who holds the lock at the moment, if the holder lives.
 * @param {string} path
 * @returns {LockHolder | null}
 */
export function findLockHolder(path) {
  const holder = readLockHolder(path)
  return holder && isStillRunning(holder) ? holder : null
}

/**
 * A hard link is the atomic step: the file appears with its whole content or not at all.
 * @param {string} from
 * @param {string} to
 */
function linkIfAbsent(from, to) {
  try {
    linkSync(from, to)
    return true
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'EEXIST') return false
    throw error
  }
}

/**
 * @param {string} path
 * @returns {LockHolder | null}
 */
function readLockHolder(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'))
  } catch {
    return null
  }
}

/**
 * Two starts may find the same stale file at once: the one that moved away a fresh lock by mistake puts it back.
 * @param {string} path
 * @param {LockHolder | null} stale
 */
function removeStaleLock(path, stale) {
  const aside = `${path}.stale.${process.pid}`
  try {
    renameSync(path, aside)
  } catch {
    return
  }
  const moved = readLockHolder(aside)
  if (moved && moved.pid !== stale?.pid && isStillRunning(moved)) linkIfAbsent(aside, path)
  rmSync(aside, { force: true })
}

/** @param {string} path */
function releaseLock(path) {
  if (readLockHolder(path)?.pid === process.pid) rmSync(path, { force: true })
}
