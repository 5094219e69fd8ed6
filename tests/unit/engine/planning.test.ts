import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  addWorkingDays, addWorkingMinutes, buildRouting, earliestSlot, isWorkingDay, mergeIntervals, nextWorkingInstant, placeJob, PlanningError, promiseDate, TimeError,
  toEpochMs, toLocalTime, weekdayOf, wireWaitDays, WORKING_WEEK, workingMinutesBetween, type Interval, type PlanCentre, type WorkCalendar,
} from '#server/engine/planning'
import { priceQuantity } from '#server/engine/pricing'
import { aDesign, aRequest } from './factories'

const dublin = (changes: Partial<WorkCalendar> = {}): WorkCalendar => ({
  timeZone: 'Europe/Dublin', shiftStartMinute: 8 * 60, shiftEndMinute: 16 * 60, weekdays: WORKING_WEEK, holidays: [], ...changes,
})
const at = (iso: string) => Date.parse(iso)
const iso = (ms: number) => new Date(ms).toISOString()
const HOUR_MS = 3_600_000

const codeOf = (act: () => unknown) => {
  try {
    act()
  } catch (error) {
    if (error instanceof PlanningError || error instanceof TimeError) return error.code
    throw error
  }
  return undefined
}

describe('local time', () => {
  it('goes both ways for every minute but those the clocks skip or repeat', () => {
    const zones = fc.constantFrom('Europe/Dublin', 'Europe/Berlin', 'America/New_York', 'Australia/Lord_Howe', 'Asia/Kathmandu', 'UTC', 'Pacific/Apia')
    fc.assert(fc.property(zones, fc.integer({ min: at('2024-01-01T00:00:00Z') / 60_000, max: at('2030-01-01T00:00:00Z') / 60_000 }), (zone, minutes) => {
      const epochMs = minutes * 60_000
      const local = toLocalTime(epochMs, zone)
      const back = toEpochMs(local, zone)
      expect(toLocalTime(back, zone)).toEqual(local)
      // A repeated minute gives its first instant, never a later one.
      expect(epochMs - back).toBeGreaterThanOrEqual(0)
      expect(epochMs - back).toBeLessThanOrEqual(HOUR_MS)
    }), { numRuns: 300 })
  })

  it('puts a skipped time at the jump and takes the first of a repeated one', () => {
    // Europe/Dublin: 2027-03-28 01:00 UTC jumps to 02:00 local; 2027-10-31 01:00 UTC goes back to 01:00 local.
    expect(iso(toEpochMs({ day: '2027-03-28', minute: 90 }, 'Europe/Dublin'))).toBe('2027-03-28T01:00:00.000Z')
    expect(iso(toEpochMs({ day: '2027-10-31', minute: 90 }, 'Europe/Dublin'))).toBe('2027-10-31T00:30:00.000Z')
    expect(iso(toEpochMs({ day: '2027-10-31', minute: 1440 }, 'Europe/Dublin'))).toBe('2027-11-01T00:00:00.000Z')
  })

  it('knows weekdays and refuses what is no date or zone', () => {
    expect(weekdayOf('2026-12-07')).toBe(1)
    expect(weekdayOf('1969-12-28')).toBe(7)
    for (const day of ['2026-02-30', 'soon', '2026-1-1']) expect(codeOf(() => weekdayOf(day)), day).toBe('date-unreadable')
    expect(codeOf(() => toLocalTime(0, 'Mars/Olympus'))).toBe('calendar-unreadable')
  })
})

describe('working time', () => {
  it('counts only inside shifts and goes on the next day', () => {
    // Friday 11 Dec 2026, 15:00: one hour on Friday, the second on Monday.
    expect(iso(addWorkingMinutes(dublin(), at('2026-12-11T15:00:00Z'), 60))).toBe('2026-12-11T16:00:00.000Z')
    expect(iso(addWorkingMinutes(dublin(), at('2026-12-11T15:00:00Z'), 61))).toBe('2026-12-14T08:01:00.000Z')
    expect(iso(addWorkingMinutes(dublin(), at('2026-12-12T12:00:00Z'), 30))).toBe('2026-12-14T08:30:00.000Z')
    expect(addWorkingMinutes(dublin(), 5, 0)).toBe(5)
  })

  it('leaves out holidays and weekdays without a shift', () => {
    const calendar = dublin({ holidays: ['2026-12-14'], weekdays: [1, 2, 3, 4] })
    expect(isWorkingDay(calendar, '2026-12-14')).toBe(false)
    expect(isWorkingDay(calendar, '2026-12-11')).toBe(false)
    expect(iso(addWorkingMinutes(calendar, at('2026-12-10T15:30:00Z'), 45))).toBe('2026-12-15T08:15:00.000Z')
  })

  it('opens at the local hour on both sides of daylight saving', () => {
    // Friday 26 March 2027 is winter time, Monday 29 March is summer time: 08:00 local is 07:00 UTC.
    expect(iso(addWorkingMinutes(dublin(), at('2027-03-26T15:30:00Z'), 60))).toBe('2027-03-29T07:30:00.000Z')
    expect(iso(nextWorkingInstant(dublin(), at('2027-10-29T15:00:00Z')))).toBe('2027-11-01T08:00:00.000Z')
  })

  it('gives a night shift the hour the clocks take and give', () => {
    const night = dublin({ shiftStartMinute: 0, shiftEndMinute: 360, weekdays: [7] })
    expect(workingMinutesBetween(night, at('2027-03-27T12:00:00Z'), at('2027-03-29T12:00:00Z'))).toBe(300)
    expect(workingMinutesBetween(night, at('2027-10-30T12:00:00Z'), at('2027-11-01T12:00:00Z'))).toBe(420)
    // A shift that lies wholly in the hour that is skipped does not exist that day.
    const skipped = dublin({ shiftStartMinute: 65, shiftEndMinute: 115, weekdays: [7] })
    expect(iso(nextWorkingInstant(skipped, at('2027-03-27T12:00:00Z')))).toBe('2027-04-04T00:05:00.000Z')
  })

  it('undoes adding by counting', () => {
    const anyStart = fc.integer({ min: at('2027-01-01T00:00:00Z') / 60_000, max: at('2027-12-31T00:00:00Z') / 60_000 })
    fc.assert(fc.property(anyStart, fc.integer({ min: 1, max: 5000 }), (startMinutes, minutes) => {
      const fromMs = startMinutes * 60_000
      const endMs = addWorkingMinutes(dublin({ holidays: ['2027-12-27'] }), fromMs, minutes)
      expect(workingMinutesBetween(dublin({ holidays: ['2027-12-27'] }), fromMs, endMs)).toBe(minutes)
    }), { numRuns: 100 })
  })

  it('counts working days', () => {
    const calendar = dublin({ holidays: ['2026-12-14'] })
    expect(addWorkingDays(calendar, '2026-12-11', 0)).toBe('2026-12-11')
    expect(addWorkingDays(calendar, '2026-12-11', 1)).toBe('2026-12-15')
    expect(addWorkingDays(calendar, '2026-12-12', 0)).toBe('2026-12-15')
  })

  it('refuses calendars that never open or make no sense', () => {
    expect(codeOf(() => nextWorkingInstant(dublin({ weekdays: [] }), 0))).toBe('never-open')
    expect(codeOf(() => addWorkingDays(dublin({ weekdays: [] }), '2026-12-11', 1))).toBe('never-open')
    expect(codeOf(() => nextWorkingInstant(dublin({ shiftEndMinute: 480 }), 0))).toBe('calendar-unreadable')
    expect(codeOf(() => nextWorkingInstant(dublin({ weekdays: [8] }), 0))).toBe('calendar-unreadable')
    expect(codeOf(() => nextWorkingInstant(dublin(), Number.NaN))).toBe('date-unreadable')
    for (const minutes of [-1, Number.NaN, Number.POSITIVE_INFINITY]) expect(codeOf(() => addWorkingMinutes(dublin(), 0, minutes))).toBe('duration-unreadable')
  })
})

const anyBusy = fc.array(
  fc.record({ offset: fc.integer({ min: 0, max: 20_000 }), length: fc.integer({ min: 0, max: 1500 }) })
    .map(({ offset, length }) => ({ startMs: at('2026-12-07T00:00:00Z') + offset * 60_000, endMs: at('2026-12-07T00:00:00Z') + (offset + length) * 60_000 })),
  { maxLength: 12 },
)
const overlaps = (a: Interval, b: Interval) => a.startMs < b.endMs && b.startMs < a.endMs && a.endMs > a.startMs && b.endMs > b.startMs

describe('the earliest slot', () => {
  it('fits before a busy stretch that leaves room and after one that does not', () => {
    const busy = [{ startMs: at('2026-12-07T10:00:00Z'), endMs: at('2026-12-07T12:00:00Z') }]
    const slot = (durationMinutes: number) => earliestSlot({ calendar: dublin(), busy, durationMinutes, notBeforeMs: at('2026-12-07T06:00:00Z') })
    expect(iso(slot(120).startMs)).toBe('2026-12-07T08:00:00.000Z')
    expect(iso(slot(121).startMs)).toBe('2026-12-07T12:00:00.000Z')
    // A gap of exactly the time needed is enough.
    expect(iso(earliestSlot({ calendar: dublin(), busy, durationMinutes: 120, notBeforeMs: at('2026-12-07T08:00:00Z') }).startMs)).toBe('2026-12-07T08:00:00.000Z')
    // Starts are on the whole minute, never before the time asked for.
    expect(iso(earliestSlot({ calendar: dublin(), busy: [], durationMinutes: 5, notBeforeMs: at('2026-12-07T08:00:00.001Z') }).startMs)).toBe('2026-12-07T08:01:00.000Z')
  })

  it('holds its centre through the night', () => {
    const slot = earliestSlot({ calendar: dublin(), busy: [], durationMinutes: 600, notBeforeMs: at('2026-12-07T08:00:00Z') })
    expect([iso(slot.startMs), iso(slot.endMs)]).toEqual(['2026-12-07T08:00:00.000Z', '2026-12-08T10:00:00.000Z'])
    const night = [{ startMs: at('2026-12-07T20:00:00Z'), endMs: at('2026-12-07T21:00:00Z') }]
    expect(iso(earliestSlot({ calendar: dublin(), busy: night, durationMinutes: 600, notBeforeMs: at('2026-12-07T08:00:00Z') }).startMs)).toBe('2026-12-08T08:00:00.000Z')
  })

  it('never touches a busy stretch, starts in a shift, and no earlier start on the minute would do', () => {
    fc.assert(fc.property(anyBusy, fc.integer({ min: 1, max: 1200 }), (busy, durationMinutes) => {
      const notBeforeMs = at('2026-12-07T05:00:00Z')
      const slot = earliestSlot({ calendar: dublin(), busy, durationMinutes, notBeforeMs })
      expect(slot.startMs).toBeGreaterThanOrEqual(notBeforeMs)
      expect(nextWorkingInstant(dublin(), slot.startMs)).toBe(slot.startMs)
      expect(workingMinutesBetween(dublin(), slot.startMs, slot.endMs)).toBe(durationMinutes)
      for (const taken of busy) expect(overlaps(slot, taken)).toBe(false)
      // A start can only be earliest at the first opening or where something busy ends.
      for (const candidate of [notBeforeMs, ...busy.map((taken) => taken.endMs)]) {
        const startMs = nextWorkingInstant(dublin(), Math.max(candidate, notBeforeMs))
        const earlier = { startMs, endMs: addWorkingMinutes(dublin(), startMs, durationMinutes) }
        if (startMs < slot.startMs) expect(busy.some((taken) => overlaps(earlier, taken))).toBe(true)
      }
    }), { numRuns: 100 })
  })

  it('merges what touches and refuses what runs backwards', () => {
    expect(mergeIntervals([{ startMs: 5, endMs: 9 }, { startMs: 0, endMs: 5 }, { startMs: 20, endMs: 20 }])).toEqual([{ startMs: 0, endMs: 9 }])
    expect(codeOf(() => mergeIntervals([{ startMs: 5, endMs: 4 }]))).toBe('interval-unreadable')
    expect(codeOf(() => earliestSlot({ calendar: dublin(), busy: [], durationMinutes: 0, notBeforeMs: 0 }))).toBe('duration-unreadable')
  })
})

const centre = (id: string, kind: PlanCentre['kind'], wire: [number, number] | null = null, calendar = dublin()): PlanCentre =>
  ({ id, kind, wireFromMm: wire?.[0] ?? null, wireToMm: wire?.[1] ?? null, calendar })
const shop = [
  centre('C1', 'coiling', [0.3, 1.2]), centre('C2', 'coiling', [1, 3.5]), centre('C4', 'coiling', [3, 8]), centre('F1', 'stress-relief'),
  centre('G1', 'end-grinding'), centre('I1', 'inspection'), centre('P1', 'packing'),
]
const operations = [
  { position: 1, kind: 'coiling' as const, setUpMinutes: 90, runMinutes: 30 },
  { position: 2, kind: 'stress-relief' as const, setUpMinutes: 0, runMinutes: 75 },
  { position: 3, kind: 'packing' as const, setUpMinutes: 0, runMinutes: 15 },
]

describe('the routing', () => {
  const minutes = priceQuantity(aRequest()).plannedMinutes
  it('follows the order of work and the ends of the spring', () => {
    expect(buildRouting(aDesign(), 500, minutes).map((operation) => [operation.position, operation.kind])).toEqual([
      [1, 'coiling'], [2, 'stress-relief'], [3, 'end-grinding'], [4, 'inspection'], [5, 'packing'],
    ])
    expect(buildRouting(aDesign({ ends: 'closed', stressReliefMinutes: 0 }), 500, minutes).map((operation) => operation.kind)).toEqual(['coiling', 'inspection', 'packing'])
    expect(buildRouting(aDesign(), 500, minutes)[0]).toMatchObject({ setUpMinutes: 90, quantity: 500, centreKind: 'coiling' })
  })
  it('refuses a price without the time of an operation', () => {
    expect(codeOf(() => buildRouting(aDesign(), 500, { coiling: { setUpMinutes: 1, runMinutes: 1 } }))).toBe('minutes-missing')
  })
})

describe('placing a job', () => {
  it('goes through its centres in order', () => {
    const placed = placeJob({ operations, centres: shop, busyByCentre: {}, wireDiameterMm: 2.5, notBeforeMs: at('2026-12-07T14:30:00Z') })
    expect(placed.operations.map(({ centreId, startMs, endMs }) => [centreId, iso(startMs), iso(endMs)])).toEqual([
      ['C2', '2026-12-07T14:30:00.000Z', '2026-12-08T08:30:00.000Z'],
      ['F1', '2026-12-08T08:30:00.000Z', '2026-12-08T09:45:00.000Z'],
      ['P1', '2026-12-08T09:45:00.000Z', '2026-12-08T10:00:00.000Z'],
    ])
    expect(placed.dispatchOn).toBe('2026-12-08')
  })

  it('takes the coiler whose range holds the wire and that is done soonest', () => {
    const busyByCentre = { C2: [{ startMs: at('2026-12-07T00:00:00Z'), endMs: at('2026-12-09T00:00:00Z') }] }
    const coilerFor = (wireDiameterMm: number) => placeJob({ operations, centres: shop, busyByCentre, wireDiameterMm, notBeforeMs: at('2026-12-07T08:00:00Z') }).operations[0]?.centreId
    expect(coilerFor(3.2)).toBe('C4')
    expect(coilerFor(1.1)).toBe('C1')
    expect(coilerFor(2)).toBe('C2')
    expect(codeOf(() => coilerFor(9))).toBe('no-centre')
  })

  it('prefers being done sooner to starting sooner', () => {
    const early = centre('A', 'coiling', null, dublin({ shiftEndMinute: 9 * 60 }))
    const late = centre('B', 'coiling', null, dublin({ shiftStartMinute: 9 * 60 }))
    const placed = placeJob({ operations: operations.slice(0, 1), centres: [early, late], busyByCentre: {}, wireDiameterMm: 2, notBeforeMs: at('2026-12-07T06:00:00Z') })
    expect(placed.operations[0]).toMatchObject({ centreId: 'B', endMs: at('2026-12-07T11:00:00Z') })
  })

  it('keeps every centre to one operation at a time and every job in order, job after job', () => {
    const anyJobs = fc.array(fc.record({
      wireDiameterMm: fc.double({ min: 0.3, max: 8, noNaN: true }), minutes: fc.array(fc.integer({ min: 1, max: 900 }), { minLength: 5, maxLength: 5 }),
      startHour: fc.integer({ min: 0, max: 200 }),
    }), { minLength: 1, maxLength: 8 })
    const kinds = ['coiling', 'stress-relief', 'end-grinding', 'inspection', 'packing'] as const
    fc.assert(fc.property(anyJobs, (jobs) => {
      const busyByCentre: Record<string, Interval[]> = {}
      for (const job of jobs) {
        const notBeforeMs = at('2026-12-07T00:00:00Z') + job.startHour * HOUR_MS
        const placed = placeJob({
          operations: kinds.map((kind, index) => ({ position: index + 1, kind, setUpMinutes: 0, runMinutes: job.minutes[index] ?? 1 })),
          centres: shop, busyByCentre, wireDiameterMm: job.wireDiameterMm, notBeforeMs,
        })
        let readyMs = notBeforeMs
        for (const operation of placed.operations) {
          expect(operation.startMs).toBeGreaterThanOrEqual(readyMs)
          readyMs = operation.endMs
          ;(busyByCentre[operation.centreId] ??= []).push(operation)
        }
        expect(placed.finishedMs).toBe(readyMs)
      }
      for (const taken of Object.values(busyByCentre)) {
        taken.forEach((a, index) => taken.slice(index + 1).forEach((b) => expect(overlaps(a, b)).toBe(false)))
      }
    }), { numRuns: 60 })
  })

  it('gives the same plan for the same question, whatever the order of centres', () => {
    const ask = (centres: PlanCentre[]) => placeJob({ operations, centres, busyByCentre: {}, wireDiameterMm: 3.2, notBeforeMs: at('2026-12-07T08:00:00Z') })
    expect(ask([...shop].reverse())).toEqual(ask(shop))
    expect(ask(shop).operations[0]?.centreId).toBe('C2')
  })
})

describe('the promised date', () => {
  const ask = (changes: Partial<Parameters<typeof promiseDate>[0]> = {}) => promiseDate({
    operations, centres: shop, busyByCentre: {}, wireDiameterMm: 2.5, nowMs: at('2026-12-01T23:30:00Z'), wireLeadDays: 0, depositHoldDays: 3, bufferDays: 1, shopCalendar: dublin(), ...changes,
  })
  it('waits for the deposit, places the job, and keeps a day in hand', () => {
    // Asked on Tue 1 Dec; deposit by Fri 4 Dec; work from Sat 5 Dec, so Mon 7 Dec; 210 min are done that day; one day in hand.
    expect(ask()).toMatchObject({ depositBy: '2026-12-04', dispatchOn: '2026-12-08', placing: { dispatchOn: '2026-12-07' } })
    expect(ask({ bufferDays: 0 }).dispatchOn).toBe('2026-12-07')
  })
  it('waits for wire that is not there', () => {
    expect(wireWaitDays({ neededKg: 10, freeStockKg: 10, leadDays: 5 })).toBe(0)
    expect(wireWaitDays({ neededKg: 10.001, freeStockKg: 10, leadDays: 5 })).toBe(5)
    // From Thu 10 Dec.
    expect(ask({ wireLeadDays: 5 }).placing.dispatchOn).toBe('2026-12-10')
  })
  it('counts days on the shop’s own clock', () => {
    expect(ask({ nowMs: at('2026-07-01T23:30:00Z') }).depositBy).toBe('2026-07-05')
    expect(ask({ nowMs: at('2026-12-01T23:30:00Z') }).depositBy).toBe('2026-12-04')
  })
})
