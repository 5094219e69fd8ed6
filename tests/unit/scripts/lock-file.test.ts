import { spawnSync } from 'node:child_process'
import { existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { findLockHolder, takeLock } from '../../../scripts/lib/lock-file.mjs'
import { identifyProcess } from '../../../scripts/lib/process-identity.mjs'

describe('the lock of a start', () => {
  let folder = ''
  let path = ''
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'wirewright-lock-'))
    path = join(folder, 'start.lock')
  })
  afterEach(() => rmSync(folder, { recursive: true }))

  it('is refused while its holder lives, with the note of the holder', () => {
    expect(takeLock(path, 'first').taken).toBe(true)
    expect(takeLock(path, 'second')).toMatchObject({ taken: false, holder: { pid: process.pid, note: 'first' } })
    expect(findLockHolder(path)?.note).toBe('first')
  })

  it('can be taken again once it is released', () => {
    const lock = takeLock(path, 'first')
    if (lock.taken) lock.release()
    expect(existsSync(path)).toBe(false)
    expect(takeLock(path, 'second').taken).toBe(true)
    expect(readdirSync(folder)).toEqual(['start.lock'])
  })

  it('passes on from a process that died without releasing it', () => {
    const { pid } = spawnSync(process.execPath, ['-e', ''])
    writeFileSync(path, JSON.stringify({ pid, startedAtTicks: '1', note: 'dead' }))
    expect(findLockHolder(path)).toBeNull()
    expect(takeLock(path, 'next').taken).toBe(true)
    expect(findLockHolder(path)?.note).toBe('next')
  })

  it('passes on when another program has got the number of the holder', () => {
    writeFileSync(path, JSON.stringify({ ...identifyProcess(process.pid), startedAtTicks: '1', note: 'reused number' }))
    expect(takeLock(path, 'next').taken).toBe(true)
  })

  it('passes on from a damaged file', () => {
    writeFileSync(path, '{"pid":')
    expect(takeLock(path, 'next').taken).toBe(true)
  })
})
