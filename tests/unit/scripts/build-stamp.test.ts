import { mkdirSync, mkdtempSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { hashSources } from '../../../scripts/lib/build-stamp.mjs'

describe('the stamp of the sources', () => {
  let folder = ''
  const write = (name: string, text: string): void => {
    mkdirSync(dirname(join(folder, name)), { recursive: true })
    writeFileSync(join(folder, name), text)
  }
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'wirewright-stamp-'))
    write('app/pages/index.vue', 'one')
    write('package-lock.json', '{}')
  })
  afterEach(() => rmSync(folder, { recursive: true }))

  it('is the same for the same sources', () => {
    expect(hashSources(folder)).toBe(hashSources(folder))
  })

  it.each(['app/pages/index.vue', 'server/api/new.get.ts', 'shared/spring/rate.ts', 'emails/quote.vue', 'drizzle/0001.sql', 'public/mark.svg', 'nuxt.config.ts', 'tailwind.config.ts', 'package-lock.json'])('changes with %s', (name) => {
    const before = hashSources(folder)
    write(name, 'two')
    expect(hashSources(folder)).not.toBe(before)
  })

  it('changes when a file is renamed or deleted', () => {
    const before = hashSources(folder)
    renameSync(join(folder, 'app/pages/index.vue'), join(folder, 'app/pages/other.vue'))
    const renamed = hashSources(folder)
    rmSync(join(folder, 'app/pages/other.vue'))
    expect(new Set([before, renamed, hashSources(folder)]).size).toBe(3)
  })

  it.each(['tests/unit/a.test.ts', 'README.md', '.data/secrets.json', 'playwright.config.ts'])('stays the same when %s changes: it is no part of the app', (name) => {
    const before = hashSources(folder)
    write(name, 'two')
    expect(hashSources(folder)).toBe(before)
  })
})
