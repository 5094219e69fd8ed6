import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { TorsionSizeRequest } from '#shared/spring'
import { TORSION_CHECKS } from '../../../shared/spring/mechanics/torsion/checks'
import { INDEX_STEPS, MEAN_DIAMETER_STEPS_MM } from '../../../shared/spring/mechanics/tolerances/mean-diameter'
import { buildTorsionModel } from '../../../shared/spring/mechanics/torsion/model'
import { activeCoilsOf, bodyLengthAtMm, createTorsionState, fillTorsionState, torsionMassG } from '../../../shared/spring/mechanics/torsion/state'
import {
  LARGE_FAILS, SMALL_FAILS, STEPPED_LARGE_FAILS, STEPPED_SMALL_FAILS, bodyConstantMm, feasibleTorsionDiameters, fillTorsion,
} from '../../../shared/spring/sizing/torsion/diameters'
import { resolveTorsionTravel } from '../../../shared/spring/sizing/torsion/travel'
import { makeWires, EN_CODES } from './springs'

const bounded = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const wires = makeWires(...EN_CODES)

// Limits are drawn near what the spring has, so that each check both holds and fails somewhere in the range.
const cases = fc.record({
  wire: fc.constantFrom(...wires), method: fc.constantFrom('en13906' as const, 'wahl' as const), loadOpens: fc.boolean(), cycles: fc.constantFrom(0, 1e6),
  legMm: fc.oneof(fc.constant(0), bounded(5, 60)), coils: bounded(2, 60), place: bounded(4, 20), share: bounded(0.3, 1.1), least: bounded(0.1, 0.9), slack: bounded(0.9, 1.1),
  keep: fc.tuple(fc.boolean(), fc.boolean(), fc.boolean(), fc.boolean()),
})

/** A request of the wire whose rate is that of a spring in the middle of the range, and whose stress is about the limit. */
function makeCase({ wire, method, loadOpens, cycles, legMm, coils, place, share, least, slack, keep }: typeof cases extends fc.Arbitrary<infer T> ? T : never) {
  const d = wire.wireDiameterMm
  const D = place * d
  const legs = legMm > 0 ? [{ lengthMm: legMm, form: 'tangential' as const }, { lengthMm: legMm, form: 'tangential' as const }] : []
  const bare = buildTorsionModel(wire, { method, loadOpens, legs })
  const state = createTorsionState(Number.NaN, Number.NaN)
  const rate = fillTorsion(bare, state, resolveTorsionTravel({ kind: 'torsion', points: [{ angleDeg: 1, momentNmm: 1 }] }), D, coils).rateNmmPerDeg
  const most = (share * bare.allowableStressMpa * Math.PI * d ** 3) / 32
  const request: TorsionSizeRequest = {
    kind: 'torsion', method, loadOpens, legs, duty: { cycles },
    points: [{ angleDeg: 0, momentNmm: least * most }, { angleDeg: ((1 - least) * most) / rate, momentNmm: most }],
    fit: {
      boreMm: keep[0] ? (D + d) * slack : undefined, rodMm: keep[1] ? (D - d) * slack * 0.9 : undefined,
      maxFreeLengthMm: keep[2] ? d * (coils + 1) * slack * 1.05 : undefined, maxSolidLengthMm: keep[3] ? d * (coils + 1) * slack : undefined,
    },
  }
  const travel = resolveTorsionTravel(request)
  const model = buildTorsionModel(wire, request)
  const K = bodyConstantMm(model, travel.rateNmmPerDeg)
  return { d, request, travel, model, state, K, at: (x: number) => fillTorsion(model, state, travel, x, K / x) }
}

const SAMPLES = 160
const between = (low: number, high: number) => Array.from({ length: SAMPLES + 1 }, (_, i) => low + ((high - low) * i) / SAMPLES)

describe('what a torsion search takes for granted', () => {
  it('has a place for every check that can stop', () => {
    const placed = [...SMALL_FAILS, ...LARGE_FAILS, STEPPED_SMALL_FAILS, STEPPED_LARGE_FAILS].map(c => c.code)
    // Wire and heat do not know the diameter; the index is the range searched; the last three never stop.
    expect([...placed, 'wire-range', 'temperature', 'index', 'winding', 'surroundings', 'method'].sort()).toEqual(TORSION_CHECKS.map(c => c.code).sort())
  })

  it('checks fail on one side of one diameter only, bore and rod between two steps of the tolerance', () => {
    const turns: Record<string, number> = {}
    fc.assert(fc.property(cases, (values) => {
      const { d, model, at } = makeCase(values)
      const steps = [...MEAN_DIAMETER_STEPS_MM, ...INDEX_STEPS.map(w => w * d)].filter(D => D > 4 * d && D < 20 * d).sort((a, b) => a - b)
      const pieces = [4 * d, ...steps, 20 * d].map((from, i, all) => [from * (1 + 1e-9), (all[i + 1] ?? from) * (1 - 1e-9)] as const).slice(0, -1)
      const whole = [[4 * d, 20 * d] as const]
      for (const [checks, ranges, failsFirst] of [
        [SMALL_FAILS, whole, true], [LARGE_FAILS, whole, false], [[STEPPED_SMALL_FAILS], pieces, true], [[STEPPED_LARGE_FAILS], pieces, false],
      ] as const) {
        for (const check of checks) {
          for (const [low, high] of ranges) {
            const verdicts = between(low, high).map((D) => {
              const state = at(D)
              return check.applies(model, state) && check.stops(model, state)
            })
            const changes = verdicts.filter((fails, i) => i > 0 && fails !== verdicts[i - 1]).length
            expect(changes, `${check.code} turns ${changes} times`).toBeLessThanOrEqual(1)
            if (changes === 0) continue
            expect(verdicts[0], check.code).toBe(failsFirst)
            turns[check.code] = (turns[check.code] ?? 0) + 1
          }
        }
      }
    }), { numRuns: 300, seed: 41 })
    // Each check was seen to turn, but for order, which coils and stress stop first.
    for (const code of ['stress-working', 'fatigue', 'free-length', 'solid-length', 'coils', 'rod', 'bore']) expect(turns[code], code).toBeGreaterThan(5)
  }, 60_000)

  it('mass, moments and the body\'s share of the turn do not depend on the diameter', () => {
    fc.assert(fc.property(cases, (values) => {
      const { d, model, at, K } = makeCase(values)
      if (!(K > 0)) return
      const measure = (D: number) => {
        const state = at(D)
        return { mass: torsionMassG(model, state), moment: state.rateNmmPerDeg * state.greatestAngleDeg, grown: bodyLengthAtMm(model, state, state.greatestAngleDeg) - bodyLengthAtMm(model, state, 0) }
      }
      const first = measure(4 * d)
      for (const D of between(4 * d, 20 * d)) {
        const here = measure(D)
        expect(here.mass / first.mass).toBeCloseTo(1, 10)
        expect(here.moment / first.moment).toBeCloseTo(1, 10)
        expect(here.grown).toBeCloseTo(first.grown, 8)
      }
    }), { numRuns: 60, seed: 42 })
  })

  it('finds all diameters that pass and none that does not', () => {
    let inside = 0
    let outside = 0
    fc.assert(fc.property(cases, (values) => {
      const { d, model, state, travel, at } = makeCase({ ...values, share: values.share * 0.6 })
      const intervals = feasibleTorsionDiameters(model, state, travel)
      for (const D of between(4 * d, 20 * d)) {
        const distance = Math.min(...intervals.map(({ lowMm, highMm }) => Math.min(Math.abs(D - lowMm), Math.abs(D - highMm))), Infinity)
        if (distance < 1e-7 * D) continue
        const found = intervals.some(({ lowMm, highMm }) => D >= lowMm && D <= highMm)
        const filled = at(D)
        const passes = TORSION_CHECKS.every(check => !check.applies(model, filled) || !check.stops(model, filled))
        expect(found).toBe(passes)
        if (found) inside++
        else outside++
      }
    }), { numRuns: 600, seed: 43 })
    expect(inside).toBeGreaterThan(2000)
    expect(outside).toBeGreaterThan(2000)
  }, 60_000)

  it('leaves the gap out where the tolerance steps up over a rod', () => {
    // At 16 mm and index 8 the tolerance of grade 2 steps from 0.30 to 0.45 mm (EN 15800): just above, less room is left than just below.
    const wire = { id: 'w', material: 'EN10270-1-SH' as const, wireDiameterMm: 2 }
    const request: TorsionSizeRequest = { kind: 'torsion', points: [{ angleDeg: 30, momentNmm: 300 }] }
    const bare = buildTorsionModel(wire, request)
    const state = createTorsionState(Number.NaN, Number.NaN)
    const travel = resolveTorsionTravel(request)
    const K = bodyConstantMm(bare, travel.rateNmmPerDeg)
    const rodMm = (K * 16) / (K + 16 * (30 / 360)) - 2 - 0.3 - 0.05
    const intervals = feasibleTorsionDiameters(buildTorsionModel(wire, { ...request, fit: { rodMm } }), state, travel)
    // Beyond, further steps only cut the range in pieces that touch.
    expect(intervals.length).toBeGreaterThanOrEqual(2)
    expect(intervals[0]?.lowMm).toBeCloseTo(15.95, 1)
    expect(intervals[0]?.highMm).toBeCloseTo(16, 9)
    expect(intervals[1]?.lowMm).toBeCloseTo(16.1, 1)
  })

  it('says of each check in words what the search is told in numbers', () => {
    const stopped: Record<string, number> = {}
    const wild = fc.record({ values: cases, index: bounded(3, 22), coils: bounded(0.5, 30), from: bounded(-20, 60), to: bounded(-20, 3000), ordered: fc.boolean(), temperatureC: bounded(-50, 300) })
    fc.assert(fc.property(wild, ({ values, index, coils, from, to, ordered, temperatureC }) => {
      const { d, request } = makeCase(values)
      const model = buildTorsionModel({ ...values.wire, wireDiameterMm: d * (ordered ? 1 : 3) }, { ...request, temperatureC })
      const state = fillTorsionState(createTorsionState(from, to), model, index * model.wireDiameterMm, coils, activeCoilsOf(model, index * model.wireDiameterMm, coils))
      state.ordered = ordered
      for (const check of TORSION_CHECKS) {
        if (!check.applies(model, state)) continue
        const said = check.describe(model, state)
        const stops = check.stops(model, state)
        expect(!said.ok && said.severity === 'stop', check.code).toBe(stops)
        expect(said.message.length).toBeGreaterThan(10)
        if (stops) stopped[check.code] = (stopped[check.code] ?? 0) + 1
      }
    }), { numRuns: 2000, seed: 44 })
    expect(Object.keys(stopped).sort()).toEqual(TORSION_CHECKS.map(c => c.code).filter(c => !['winding', 'surroundings', 'method'].includes(c)).sort())
  })
})
