import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, inject, it } from 'vitest'
import { readSpringAddress } from '#shared/schemas/spring/sheet'
import { SPRING_KINDS, type SpringKind } from '#shared/spring/codes'
import { sheetNumber, sheetOf, writeSheetValue } from '#shared/spring/sheet'
import { EXAMPLE_ADDRESSES } from '#shared/spring/sheet/examples'
import type { UnitSystem } from '#shared/units/convert'
import { useServices } from './support/services'
import { Visitor } from './support/visitor'

const folder = mkdtempSync(join(tmpdir(), 'sheet-'))
afterAll(() => rmSync(folder, { recursive: true }))

const address = (query: Record<string, string>): string => `/api/springs/sheet.pdf?${new URLSearchParams(query).toString()}`
const fetchSheet = (query: Record<string, string>): Promise<Response> => fetch(inject('baseUrl') + address(query))
/** One space for any white space, and the characters that the sheet's fonts have. */
const plain = (text: string): string => text.replace(/\u2300/g, 'Ø').replace(/\s+/g, ' ').trim()

async function readSheet(query: Record<string, string>): Promise<{ text: string, info: string }> {
  const answer = await fetchSheet(query)
  expect(answer.status, await answer.clone().text().then(text => text.slice(0, 300))).toBe(200)
  const file = join(folder, 'sheet.pdf')
  writeFileSync(file, Buffer.from(await answer.arrayBuffer()))
  return { text: plain(execFileSync('pdftotext', ['-raw', file, '-'], { encoding: 'utf8' })), info: execFileSync('pdfinfo', [file], { encoding: 'utf8' }) }
}
const FULL: Record<SpringKind, Record<string, string>> = {
  compression: { temperature: '60C', maxL0: '70mm', Rm: '1850MPa' }, extension: { temperature: '60C', cycles: '200000', bore: '20mm', rod: '5mm' }, torsion: { temperature: '60C', cycles: '200000', bore: '30mm' },
}

describe.each(SPRING_KINDS.flatMap(kind => (['metric', 'inch'] as const).map(units => ({ kind, units }))))('the printed sheet of a $kind spring, $units', ({ kind, units }: { kind: SpringKind, units: UnitSystem }) => {
  const query = { ...EXAMPLE_ADDRESSES[kind], ...FULL[kind] }

  it('holds every figure of the rows, each check, tolerance, assumption and caution, and its title block', async () => {
    const { spring } = readSpringAddress(query)
    if (!spring) throw new Error('the query cannot be read')
    const { sheet } = sheetOf(spring)
    const { text, info } = await readSheet({ ...query, units })
    const missing = (wanted: readonly string[]) => wanted.map(plain).filter(one => !text.includes(one))
    expect(missing(sheet.groups.flatMap(group => [group.title, ...group.rows.flatMap(row => [row.name, writeSheetValue(row.value, row.quantity, units)])]))).toEqual([])
    expect(missing(sheet.groups.flatMap(group => group.rows.map(row => row.basis).filter(basis => !/[_\u0370-\u03ff]/.test(basis))))).toEqual([])
    expect(missing(sheet.points.rows.flatMap(row => row.map((value, at) => writeSheetValue(value, sheet.points.columns[at]?.quantity ?? 'ratio', units))))).toEqual([])
    expect(missing(sheet.checks.flatMap(check => [check.name, check.message, ...[check.value, check.limit].flatMap(value => (check.unit && value !== null ? [writeSheetValue(value, check.unit, units)] : []))]))).toEqual([])
    expect(missing(sheet.tolerances.flatMap(one => [one.name, one.source, `±${writeSheetValue(one.plusMinus, one.unit, units)}`]))).toEqual([])
    expect(missing([...sheet.assumptions, ...sheet.cautions])).toEqual([])

    const pages = Number(/Pages:\s+(\d+)/.exec(info)?.[1])
    expect(pages).toBeGreaterThan(1)
    expect(missing([sheetNumber(query), `1 of ${pages}`, `${pages} of ${pages}`, 'computed', units === 'inch' ? 'in, lbf' : 'mm, N'])).toEqual([])
    expect(text).toMatch(/\d+:1|1:\d+/)
    expect(info).toMatch(new RegExp(`Title:\\s+${sheet.title} ${sheetNumber(query)}: data sheet`))
    expect(info).toMatch(/Tagged:\s+yes/)
    expect(info).toMatch(/Page size:\s+595\.28 x 841\.89 pts \(A4\)/)
  })
})

describe('the route of the data sheet', () => {
  it('answers with a PDF to look at, under a safe name, that no page may take for something else', async () => {
    const { status, headers } = await fetchSheet(EXAMPLE_ADDRESSES.compression)
    expect(status).toBe(200)
    expect(headers.get('content-type')).toBe('application/pdf')
    expect(headers.get('content-disposition')).toMatch(/^inline; filename="SP-[0-9A-F]{8}\.pdf"$/)
    expect(headers.get('x-content-type-options')).toBe('nosniff')
    expect(headers.get('content-security-policy')).toBe(`default-src 'none'; frame-ancestors 'none'`)
    expect(headers.get('cache-control')).toBe('no-store')
  })

  it('prints a spring that nobody could make, with the checks that fail', async () => {
    const { text } = await readSheet({ kind: 'compression', material: 'ASTM-A228', d: '2mm', D: '3.1mm', n: '0.5', L0: '900mm', p1: 'L1mm' })
    expect(text).toContain('FAILS')
  })

  it.each([
    ['nothing', {}, ['kind']],
    ['a kind alone', { kind: 'torsion' }, ['D', 'd', 'material']],
    ['a value that is no number', { ...EXAMPLE_ADDRESSES.extension, d: 'thick' }, ['d']],
    ['an unknown name', { ...EXAMPLE_ADDRESSES.extension, colour: 'red' }, ['colour']],
    ['an infinite value', { ...EXAMPLE_ADDRESSES.compression, L0: '1e999mm' }, ['L0']],
    ['unknown units', { ...EXAMPLE_ADDRESSES.compression, units: 'parsec' }, ['units']],
    ['a prototype', { ...EXAMPLE_ADDRESSES.compression, constructor: '1' }, ['constructor']],
  ] as const)('refuses %s with the parameter and the reason', async (_, query, names) => {
    const { status, body, headers } = await new Visitor().get<{ errors: { path: string, message: string }[] }>(address(query))
    expect(status).toBe(422)
    expect(headers.get('content-type')).toContain('application/problem+json')
    expect(body.errors.map(error => error.path).sort()).toEqual([...names])
    expect(body.errors.every(error => error.message.length > 10)).toBe(true)
  })

  it('refuses a parameter that is given twice', async () => {
    const { status } = await new Visitor().get(`${address(EXAMPLE_ADDRESSES.compression)}&d=3mm`)
    expect(status).toBe(400)
  })

  it('prints no more than its limit from one address', async () => {
    const { secondApp } = useServices()
    await secondApp.start({ NUXT_LIMITS: 'on' })
    try {
      const statuses: number[] = []
      for (let i = 0; i < 31; i += 1) statuses.push((await new Visitor(inject('secondAppUrl')).get(address({ kind: 'torsion' }))).status)
      expect(statuses.slice(0, 30).every(status => status === 422)).toBe(true)
      expect(statuses.at(-1)).toBe(429)
    }
    finally {
      await secondApp.stop()
    }
  })
})
