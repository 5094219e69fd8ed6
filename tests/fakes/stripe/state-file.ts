import { closeSync, existsSync, fsyncSync, mkdirSync, openSync, readFileSync, renameSync, writeSync } from 'node:fs'
import { dirname } from 'node:path'
import { createEmptyState } from './state'
import type { FakeState } from './state'

function isState(value: unknown): value is FakeState {
  return typeof value === 'object' && value !== null && 'format' in value && value.format === 1
    && Object.keys(createEmptyState()).every(key => key in value)
}

/** Reads the kept state, or an empty one when there is no file yet. Throws with advice when the file is not ours. */
export function loadState(path: string | null): FakeState {
  if (path === null || !existsSync(path)) return createEmptyState()
  let read: unknown
  try {
    read = JSON.parse(readFileSync(path, 'utf8'))
  } catch (cause) {
    throw new Error(`The payment fake's state file cannot be read as JSON. Move ${path} away to start afresh.`, { cause })
  }
  if (!isState(read)) throw new Error(`The payment fake's state file has another layout. Move ${path} away to start afresh.`)
  return read
}

/** Writes the whole state to a neighbour file, flushes it and renames it into place: a crash leaves the old or the new file. */
export function saveState(path: string, state: FakeState): void {
  mkdirSync(dirname(path), { recursive: true })
  const draft = `${path}.${process.pid}.new`
  const file = openSync(draft, 'w', 0o600)
  try {
    writeSync(file, JSON.stringify(state))
    fsyncSync(file)
  } finally {
    closeSync(file)
  }
  renameSync(draft, path)
}
