import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readSpringAddress } from '#shared/schemas/spring/sheet'
import { SPRING_KINDS, type SpringKind } from '#shared/spring/codes'
import type { SpringInput } from '#shared/spring'
import { formulaRuns, sheetOf, writeSheetValue, type SheetRow } from '#shared/spring/sheet'
import { EXAMPLE_ADDRESSES } from '#shared/spring/sheet/examples'
import { ADDRESS_PARAMS, paramsOf } from '#shared/spring/sheet/address-params'
import { anySpring } from './springs-of-all-kinds'

const example = (kind: SpringKind, more: Record<string, string> = {}): SpringInput => {
  const { spring, faults } = readSpringAddress({ ...EXAMPLE_ADDRESSES[kind], ...more })
  if (!spring) throw new Error(JSON.stringify(faults))
  return spring
}
/** Everything stated, so that no value is null. */
const FULL: Record<SpringKind, Record<string, string>> = {
  compression: { cycles: '200000', temperature: '60C', strokes: '30' }, extension: { cycles: '200000', temperature: '60C' }, torsion: { cycles: '200000', temperature: '60C' },
}

/** The paths of all plain values in an object: `points.0.forceN`. */
function leaves(value: unknown, path = ''): [string, unknown][] {
  if (typeof value !== 'object' || value === null) return [[path, value]]
  return Object.entries(value).flatMap(([key, one]) => leaves(one, path ? `${path}.${key}` : key))
}
const rowsOf = (spring: SpringInput): SheetRow[] => sheetOf(spring).sheet.groups.flatMap(group => group.rows)

/** What is typed and comes back in the evaluation under a name of its own. */
const SHOWN_AS: Readonly<Record<string, string>> = {
  'hook.bendRadiusMm': 'hookBendRadiusMm', 'hook.sideBendRadiusMm': 'hookSideBendRadiusMm', 'materialValues.tensileStrengthMpa': 'tensileStrengthMpa',
}

/** Lists that the sheet prints whole, as lists of their own. */
const PRINTED_WHOLE = ['checks', 'tolerances', 'assumptions', 'kind']

describe.each(SPRING_KINDS)('the data sheet of a %s spring', (kind) => {
  it('shows every value that is worked out, as it is', () => {
    const spring = example(kind, FULL[kind])
    const { evaluation, sheet } = sheetOf(spring)
    const shown = new Map(sheet.groups.flatMap(group => group.rows.map(row => [row.field, row.value] as const)))
    for (const [path, value] of leaves(evaluation)) {
      const [first = '', index, field] = path.split('.')
      if (PRINTED_WHOLE.includes(first)) continue
      if (first === 'points') {
        const column = sheet.points.columns.findIndex(one => one.field === field)
        expect(column, path).toBeGreaterThanOrEqual(0)
        expect(sheet.points.rows[Number(index)]?.[column], path).toBe(value)
      }
      else {
        expect(shown.has(path), `${path} has no row`).toBe(true)
        if (typeof value !== 'boolean') expect(shown.get(path), path).toBe(value)
      }
    }
    expect(sheet.checks.map(check => [check.code, check.message])).toEqual(evaluation.checks.map(check => [check.code, check.message]))
    expect(sheet.tolerances.map(one => one.plusMinus)).toEqual(evaluation.tolerances.map(one => one.plusMinus))
    expect(sheet.assumptions).toEqual(evaluation.assumptions)
  })

  it('shows everything that may be typed', () => {
    const everything: Record<string, string> = {
      nt: '10.25', n: kind === 'compression' ? '8.25' : '21', r1: '6mm', r2: '5mm', hook: 'full-loop', L0: '60mm', seat: '0.5', guided: 'yes', solid: 'safe', opens: 'no', bore: '24mm', rod: '9mm', mandrel: '9mm',
      maxL0: '100mm', maxLc: '50mm', method: 'wahl', cycles: '100000', strokes: '30', temperature: '40C', peened: 'yes', preset: 'no', grade: '2', Rm: '1900MPa', G: '80000MPa', E: '200000MPa', rho: '7900',
    }
    const query = { ...EXAMPLE_ADDRESSES[kind], ...Object.fromEntries(Object.entries(everything).filter(([name]) => paramsOf(kind).some(param => param.name === name))) }
    const { spring, faults } = readSpringAddress(query)
    if (!spring) throw new Error(JSON.stringify(faults))
    const fields = new Set(rowsOf(spring).map(row => row.field))
    for (const param of ADDRESS_PARAMS) {
      const path = param.paths[kind]
      // Of the points, what is given is one of the columns.
      if (!path || path.startsWith('points.')) continue
      expect(fields.has(SHOWN_AS[path] ?? path), `${param.name} (${path}) has no row`).toBe(true)
    }
  })

  it('gives no number without what it rests on', () => {
    for (const row of rowsOf(example(kind, FULL[kind]))) {
      if (row.value !== 'not stated') expect(row.basis, row.name).not.toBe('')
      if (typeof row.value === 'number' && row.basis !== 'given' && !row.field.startsWith('material') && row.field !== 'tensileStrengthMpa' && row.field !== 'fatigue.lifeFractionSafetyFactor')
        expect(row.formula === '' ? row.basis : row.formula, row.name).toMatch(row.formula === '' ? /^given/ : /./)
    }
    for (const column of sheetOf(example(kind)).sheet.points.columns) expect(`${column.formula}|${column.basis}`).toMatch(/.\|./)
  })

  it('names and measures every check, and each name stands for one check', () => {
    const { sheet } = sheetOf(example(kind, { ...FULL[kind], bore: '30mm', rod: '8mm', maxL0: '100mm', maxLc: '60mm', strokes: '30', peened: 'yes' }))
    for (const check of sheet.checks) {
      expect(check.name, `${check.code} has no name`).not.toBe(check.code)
      if (check.value !== null) expect(check.unit, check.code).not.toBeNull()
    }
    expect(new Set(sheet.checks.map(check => check.name)).size).toBe(sheet.checks.length)
  })
})

it('never throws, whatever the spring, and writes every value in both units', () => {
  fc.assert(fc.property(anySpring, (spring) => {
    const { sheet } = sheetOf(spring)
    for (const units of ['metric', 'inch'] as const) {
      for (const { value, quantity } of sheet.groups.flatMap(group => group.rows)) expect(writeSheetValue(value, quantity, units)).toMatch(/\S/)
    }
  }))
})

it('writes a value in the units asked for', () => {
  expect(writeSheetValue(25.4, 'length', 'inch')).toBe('1.000\u202fin')
  // 7850 kg/m3 is 0.2836 lb/in3 (Machinery's Handbook, from memory)
  expect(writeSheetValue(7850, 'density', 'inch')).toBe('0.2836\u202flb/in³')
  expect(writeSheetValue(8.25, 'coils', 'metric')).toBe('8.25')
  expect(writeSheetValue(null, 'stress', 'metric')).toBe('none')
})

it('cuts a formula at its powers and indices', () => {
  expect(formulaRuns('R = G d^4/(8 D^3 n_t)')).toEqual([
    { text: 'R = G d' }, { text: '4', style: 'power' }, { text: '/(8 D' }, { text: '3', style: 'power' }, { text: ' n' }, { text: 't', style: 'index' }, { text: ')' },
  ])
})
