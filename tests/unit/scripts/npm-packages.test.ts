import { describe, expect, it } from 'vitest'
import { isRecordComplete } from '../../../scripts/lib/npm-packages.mjs'

const locked = { '': { version: '0.1.0' }, 'node_modules/pg': { version: '8.23.1' }, 'node_modules/fsevents': { version: '2.3.3', optional: true } }

describe("npm's record of what is installed", () => {
  it('agrees with the lock file when every needed package is there, the optional ones of other machines aside', () => {
    expect(isRecordComplete(locked, { 'node_modules/pg': { version: '8.23.1' } })).toBe(true)
  })

  it('agrees when what is absent is a leftover that npm does not install from the lock file', () => {
    expect(isRecordComplete({ 'node_modules/old': { version: '1.0.0', extraneous: true } }, {})).toBe(true)
  })

  it('disagrees when a package is absent', () => {
    expect(isRecordComplete(locked, {})).toBe(false)
  })

  it('disagrees when a package has another version, an optional one too', () => {
    expect(isRecordComplete(locked, { 'node_modules/pg': { version: '8.23.0' } })).toBe(false)
    expect(isRecordComplete(locked, { 'node_modules/pg': { version: '8.23.1' }, 'node_modules/fsevents': { version: '2.0.0', optional: true } })).toBe(false)
  })
})
