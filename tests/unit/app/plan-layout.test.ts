import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { barPieces, laneLabels, positionOf, workingDays, type PlanWindow } from '../../../app/utils/plan-layout'

const window: PlanWindow = { days: workingDays('2026-12-07', 10), startMinute: 6 * 60, endMinute: 22 * 60, timeZone: 'Europe/Dublin' }
const early = { startMinute: 6 * 60, endMinute: 14 * 60 }

describe('the days of the plan', () => {
  it('are Monday to Friday, two weeks of them', () => {
    expect(window.days).toEqual(['2026-12-07', '2026-12-08', '2026-12-09', '2026-12-10', '2026-12-11', '2026-12-14', '2026-12-15', '2026-12-16', '2026-12-17', '2026-12-18'])
  })
  it('start on Monday when the first day is a Saturday', () => {
    expect(workingDays('2026-12-12', 1)).toEqual(['2026-12-14'])
  })
})

describe('a moment in the plan', () => {
  it('stands at its share of its day', () => {
    // Tuesday 14:00 of ten days from 06 to 22: one day and half of the next.
    expect(positionOf(new Date('2026-12-08T14:00:00Z'), window)).toBeCloseTo(15, 9)
  })
  it('is nowhere on a day that is not shown', () => {
    expect(positionOf(new Date('2026-12-12T12:00:00Z'), window)).toBeNull()
  })
  it('is read in the zone of the shop, an hour later in summer', () => {
    const july: PlanWindow = { ...window, days: ['2026-07-01'] }
    expect(positionOf(new Date('2026-07-01T05:00:00Z'), july)).toBe(0)
    expect(positionOf(new Date('2026-07-01T13:00:00Z'), july)).toBeCloseTo(50, 9)
  })
})

describe('a bar', () => {
  it('of one shift is one piece', () => {
    const [piece, ...others] = barPieces(new Date('2026-12-07T08:00:00Z'), new Date('2026-12-07T10:00:00Z'), window, early)
    expect(others).toEqual([])
    expect(piece).toMatchObject({ continuesBefore: false, continuesAfter: false })
    expect(piece!.leftPercent).toBeCloseTo(2 / 16 * 10, 9)
    expect(piece!.widthPercent).toBeCloseTo(2 / 16 * 10, 9)
  })
  it('over a night stops with the shift and goes on with the next', () => {
    const pieces = barPieces(new Date('2026-12-07T12:00:00Z'), new Date('2026-12-08T07:00:00Z'), window, early)
    expect(pieces.map(piece => [piece.continuesBefore, piece.continuesAfter])).toEqual([[false, true], [true, false]])
    expect(pieces[0]!.widthPercent).toBeCloseTo(2 / 16 * 10, 9)
    expect(pieces[1]!.leftPercent).toBeCloseTo(10, 9)
    expect(pieces[1]!.widthPercent).toBeCloseTo(1 / 16 * 10, 9)
  })
  it('never leaves the plan nor has no width, wherever it lies', () => {
    const start = Date.parse('2026-12-01T00:00:00Z')
    fc.assert(fc.property(fc.integer({ min: 0, max: 40_000 }), fc.integer({ min: 1, max: 20_000 }), (fromMinute, minutes) => {
      const from = new Date(start + fromMinute * 60_000)
      for (const piece of barPieces(from, new Date(from.getTime() + minutes * 60_000), window, early)) {
        expect(piece.leftPercent).toBeGreaterThanOrEqual(0)
        expect(piece.widthPercent).toBeGreaterThan(0)
        expect(piece.leftPercent + piece.widthPercent).toBeLessThanOrEqual(100 + 1e-9)
      }
    }))
  })
})

describe('words beneath narrow bars', () => {
  it('stand at their bar', () => {
    expect(laneLabels([{ leftPercent: 20, text: '1202' }, { leftPercent: 2, text: '1201' }], 5)).toEqual([{ leftPercent: 2, text: '1201' }, { leftPercent: 20, text: '1202' }])
  })
  it('are joined where they would overlap', () => {
    expect(laneLabels([{ leftPercent: 2, text: '1201' }, { leftPercent: 4, text: '1202' }], 5)).toEqual([{ leftPercent: 2, text: '1201, 1202' }])
  })
  it('name the first and the last of many', () => {
    expect(laneLabels([2, 3, 4, 5, 16].map(leftPercent => ({ leftPercent, text: String(1200 + leftPercent) })), 5)).toEqual([{ leftPercent: 2, text: '1202 to 1205' }, { leftPercent: 16, text: '1216' }])
  })
})
