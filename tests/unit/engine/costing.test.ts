import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compareJobCost, type JobActuals } from '#server/engine/costing'
import { applyOverrides, priceQuantity } from '#server/engine/pricing'
import { aRequest } from './factories'

const quoted = [
  { code: 'wire', label: 'Wire, SH 2.50', basis: '58.00 kg', amountMinor: 17_110 },
  { code: 'coiling-set-up', label: 'Coiling, set-up', basis: '1.50 h', amountMinor: 8100 },
  { code: 'coiling-run', label: 'Coiling, run', basis: '2.00 h', amountMinor: 10_800 },
  { code: 'end-grinding', label: 'End grinding', basis: '2.75 h', amountMinor: 12_650 },
  { code: 'certificate', label: 'Certificate 3.1', basis: '1 certificate', amountMinor: 1800 },
  { code: 'packing', label: 'Packing and dispatch', basis: '1 order', amountMinor: 2400 },
  { code: 'overhead', label: 'Overhead', basis: 'of cost', amountMinor: 9999 },
  { code: 'margin', label: 'Margin', basis: 'of price', amountMinor: 9999 },
]
const hourlyRates = { 'coiling': '54.00', 'stress-relief': '22.00', 'end-grinding': '46.00', 'inspection': '42.00', 'packing': '34.00' }
const actuals = (changes: Partial<JobActuals> = {}): JobActuals => ({ minutes: {}, wireKg: null, wirePricePerKg: '3.05', hourlyRates, ...changes })

const everything = actuals({
  wireKg: 62,
  minutes: { 'coiling': { setUpMinutes: 135, runMinutes: 108 }, 'end-grinding': { setUpMinutes: 30, runMinutes: 180 }, 'packing': { setUpMinutes: null, runMinutes: 20 } },
  other: [{ lineCode: 'certificate', label: 'Mill certificate', amountMinor: 1750 }, { lineCode: 'packing', label: 'Carriage', amountMinor: 1500 }],
})

describe('what a job cost', () => {
  it('sets what was recorded against what was quoted, line by line', () => {
    const { rows, total } = compareJobCost(quoted, everything, 'eur')
    expect(rows.map((row) => [row.code, row.actualBasis, row.actualMinor, row.differenceMinor])).toEqual([
      // 62 kg at 3.05.
      ['wire', '62.00\u202Fkg', 18_910, 1800],
      // 2.25 h and 1.80 h at 54.
      ['coiling-set-up', '2.25\u202Fh', 12_150, 4050],
      ['coiling-run', '1.80\u202Fh', 9720, -1080],
      // 3.50 h at 46.
      ['end-grinding', '3.50\u202Fh', 16_100, 3450],
      ['certificate', '1 invoice', 1750, -50],
      // 20 min at 34 is 11.333..., rounded once, and 15.00.
      ['packing', '0.33\u202Fh and 1 invoice', 2633, 233],
    ])
    expect(total).toEqual({
      quotedMinor: 52_860, comparedQuotedMinor: 52_860, actualMinor: 61_263, differenceMinor: 8403, isComplete: true, notRecorded: [], words: 'Every line is recorded.',
    })
  })

  it('shows what was not recorded as such and not as zero', () => {
    const { rows, total } = compareJobCost(quoted, actuals({ wireKg: 0, minutes: { coiling: { setUpMinutes: null, runMinutes: 60 } } }), 'eur')
    expect(rows.find((row) => row.code === 'coiling-set-up')).toMatchObject({ actualMinor: null, differenceMinor: null, actualBasis: 'not recorded' })
    // Nought that was recorded is a record.
    expect(rows.find((row) => row.code === 'wire')).toMatchObject({ actualMinor: 0, differenceMinor: -17_110 })
    expect(total).toMatchObject({ isComplete: false, notRecorded: ['Coiling, set-up', 'End grinding', 'Certificate 3.1', 'Packing and dispatch'], comparedQuotedMinor: 27_910, actualMinor: 5400 })
    expect(total.words).toBe('Without Coiling, set-up; End grinding; Certificate 3.1; Packing and dispatch: not recorded. The difference compares recorded lines only.')
  })

  it('says so where nothing is recorded yet', () => {
    const { rows, total } = compareJobCost(quoted, actuals(), 'eur')
    expect(rows.every((row) => row.actualMinor === null)).toBe(true)
    expect(total).toMatchObject({ actualMinor: 0, differenceMinor: 0, isComplete: false, words: 'Nothing is recorded yet.' })
  })

  it('gives work and costs nobody quoted a row of their own', () => {
    const { rows, total } = compareJobCost(quoted.slice(0, 1), actuals({
      wireKg: 58,
      minutes: { 'stress-relief': { setUpMinutes: null, runMinutes: 90 } },
      other: [{ lineCode: 'crack-test', label: 'Crack test, outside', amountMinor: 6500 }, { lineCode: 'crack-test', label: 'again', amountMinor: 500 }],
    }), 'eur')
    expect(rows.slice(1)).toEqual([
      { code: 'stress-relief', label: 'Stress relief', quotedBasis: 'not quoted', actualBasis: '1.50\u202Fh', quotedMinor: 0, actualMinor: 3300, differenceMinor: 3300 },
      { code: 'crack-test', label: 'Crack test, outside', quotedBasis: 'not quoted', actualBasis: '2 invoices', quotedMinor: 0, actualMinor: 7000, differenceMinor: 7000 },
    ])
    expect(total.isComplete).toBe(true)
  })

  it('takes the lines of a quote as they were sent, overrides with them', () => {
    const sent = applyOverrides(priceQuantity(aRequest()), [{ lineCode: 'coiling-set-up', amountMinor: 17_550, reason: 'second arbor' }])
    const { rows, total } = compareJobCost(sent.lines, everything, sent.currency)
    expect(rows.find((row) => row.code === 'coiling-set-up')?.quotedMinor).toBe(17_550)
    expect(total.quotedMinor).toBe(sent.costMinor)
  })

  it('always adds up', () => {
    const minutes = fc.option(fc.double({ min: 0, max: 5000, noNaN: true }), { nil: null })
    const recorded = fc.record({ setUpMinutes: minutes, runMinutes: minutes })
    const anyActuals = fc.record({
      wireKg: fc.option(fc.double({ min: 0, max: 900, noNaN: true }), { nil: null }),
      minutes: fc.record({ 'coiling': recorded, 'end-grinding': recorded, 'inspection': recorded, 'packing': recorded }, { requiredKeys: [] }),
    })
    fc.assert(fc.property(anyActuals, (drawn) => {
      const { rows, total } = compareJobCost(quoted, actuals(drawn as Partial<JobActuals>), 'eur')
      const sum = (pick: (row: (typeof rows)[number]) => number | null) => rows.reduce((all, row) => all + (pick(row) ?? 0), 0)
      expect(sum((row) => row.quotedMinor)).toBe(total.quotedMinor)
      expect(sum((row) => row.actualMinor)).toBe(total.actualMinor)
      expect(sum((row) => row.differenceMinor)).toBe(total.differenceMinor)
      expect(total.actualMinor - total.comparedQuotedMinor).toBe(total.differenceMinor)
      for (const row of rows) expect(row.actualMinor === null).toBe(row.actualBasis === 'not recorded')
    }))
  })
})
