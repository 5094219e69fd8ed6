import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { meanDiameterToleranceMm, type CompressionSizeRequest, type SizingWire } from '#shared/spring'
import type { CompressionCheck } from '../../../shared/spring/mechanics/compression/checks/check'
import { buildCompressionModel } from '../../../shared/spring/mechanics/compression/model'
import { stateMassG } from '../../../shared/spring/mechanics/compression/state'
import { leastMassFixedG, lightestDiameterMm } from '../../../shared/spring/sizing/compression/fixed-mass'
import {
  CONSTANT_CHECKS, LEAST_DIAMETER_CHECKS, MOST_DIAMETER_CHECKS, feasibleDiameters, fillAtDiameter, hasFeasibleDiameter,
} from '../../../shared/spring/sizing/compression/fixed-travel'
import { coilRange, fillFreeRate, massBoundG } from '../../../shared/spring/sizing/compression/free-rate'
import { createSearchState } from '../../../shared/spring/sizing/compression/search-state'
import { resolveTravel, type FixedTravel, type FreeRateTravel } from '../../../shared/spring/sizing/compression/travel'
import { evenly, oneLoad, twoLoads } from './arbitrary-compression'

/*
 * The claims that the search of compression springs stands on (the comments of fixed-travel.ts, fixed-mass.ts and free-rate.ts),
 * tried on random springs: a check that fails below a diameter fails at every smaller one, and so on.
 */
// Index from 4 to 20, as a share of the way.
const share = evenly(0, 1)
const diameterOf = (d: number, share: number) => d * (4 + 16 * share)

function setUp<T extends FixedTravel | FreeRateTravel>({ wire, request }: { wire: SizingWire, request: CompressionSizeRequest }) {
  const travel = resolveTravel(request) as T
  return { model: buildCompressionModel(wire, request), travel, state: createSearchState(travel) }
}

describe('at fixed rate and free length', () => {
  const tries = { passes: 0, fails: 0 }
  const holds = (check: CompressionCheck, at: ReturnType<typeof setUp<FixedTravel>>, D: number) => {
    fillAtDiameter(at.model, at.state, at.travel, D)
    const ok = !check.applies(at.model, at.state) || !check.stops(at.model, at.state)
    tries[ok ? 'passes' : 'fails']++
    return ok
  }

  it('each check is constant, fails only below, or fails only above some diameter', () => {
    fc.assert(fc.property(twoLoads, share, share, (request, s, t) => {
      const at = setUp<FixedTravel>(request)
      const d = at.model.wireDiameterMm
      const small = diameterOf(d, Math.min(s, t))
      const large = diameterOf(d, Math.max(s, t))
      for (const check of CONSTANT_CHECKS) expect(holds(check, at, small), check.code).toBe(holds(check, at, large))
      for (const check of LEAST_DIAMETER_CHECKS) if (holds(check, at, small)) expect(holds(check, at, large), check.code).toBe(true)
      // The tolerance ends at 200 mm, where the search cuts the range of the bore.
      if (small <= 200 && large > 200) return
      for (const check of MOST_DIAMETER_CHECKS) if (holds(check, at, large)) expect(holds(check, at, small), check.code).toBe(true)
    }), { numRuns: 20_000 })
    expect(tries.passes).toBeGreaterThan(50_000)
    expect(tries.fails).toBeGreaterThan(20_000)
  })

  it('the diameter tolerance never falls with the diameter or the index', () => {
    fc.assert(fc.property(evenly(0.63, 200), evenly(0.63, 200), evenly(4, 20), evenly(4, 20), fc.constantFrom(1 as const, 2 as const, 3 as const), (D, E, w, v, grade) => {
      const low = meanDiameterToleranceMm(Math.min(D, E), Math.min(w, v), grade)
      const high = meanDiameterToleranceMm(Math.max(D, E), Math.max(w, v), grade)
      expect(low).toBeLessThanOrEqual(high)
    }), { numRuns: 5000 })
  })

  it('no diameter is lighter than the valley, and the bound of a wire lies under all', () => {
    fc.assert(fc.property(twoLoads, share, share, share, (request, s, t, u) => {
      const { model, travel, state } = setUp<FixedTravel>(request)
      const d = model.wireDiameterMm
      const [low = 0, middle = 0, high = 0] = [s, t, u].sort((a, b) => a - b).map(x => diameterOf(d, x))
      const mass = (D: number) => stateMassG(model, fillAtDiameter(model, state, travel, D))
      // Where the coils would leave nothing of the free length there is no spring.
      fc.pre(travel.freeLengthMm > 4 * d)
      const lightest = mass(lightestDiameterMm(model, state, travel, low, high))
      expect(lightest).toBeLessThanOrEqual(mass(middle) * (1 + 2.1e-4))
      if (model.ends !== 'open-ground') expect(lightest).toBeLessThanOrEqual(mass(middle) * (1 + 1e-9))
      expect(leastMassFixedG(model, state, travel)).toBeLessThanOrEqual(mass(middle))
    }), { numRuns: 3000 })
  })

  it('a diameter passes if and only if it lies in a feasible interval, and the short question agrees', () => {
    let inside = 0
    let outside = 0
    fc.assert(fc.property(twoLoads, share, (request, s) => {
      const at = setUp<FixedTravel>(request)
      const D = diameterOf(at.model.wireDiameterMm, s)
      const intervals = feasibleDiameters(at.model, at.state, at.travel)
      expect(hasFeasibleDiameter(at.model, at.state, at.travel)).toBe(intervals.length > 0)
      const passes = [...CONSTANT_CHECKS, ...LEAST_DIAMETER_CHECKS, ...MOST_DIAMETER_CHECKS].every(check => holds(check, at, D)) && rodHolds(at, D)
      const isNearEdge = intervals.some(({ lowMm, highMm }) => Math.abs(D / lowMm - 1) < 1e-8 || Math.abs(D / highMm - 1) < 1e-8)
      if (isNearEdge) return
      if (passes) inside++
      else outside++
      expect(intervals.some(({ lowMm, highMm }) => D >= lowMm && D <= highMm)).toBe(passes)
    }), { numRuns: 20_000 })
    expect(inside).toBeGreaterThan(500)
    expect(outside).toBeGreaterThan(5000)
  })
})

function rodHolds({ model, state, travel }: ReturnType<typeof setUp<FixedTravel>>, D: number): boolean {
  if (Number.isNaN(model.rodMm)) return true
  fillAtDiameter(model, state, travel, D)
  const tolerance = meanDiameterToleranceMm(D, state.springIndex, model.grade)
  return D - model.wireDiameterMm - (Number.isNaN(tolerance) ? 0 : tolerance) >= model.rodMm * (1 - 1e-9)
}

describe('with one load and the rate free', () => {
  it('no spring of a range of diameters is lighter than its bound', () => {
    let compared = 0
    fc.assert(fc.property(oneLoad, share, share, share, (request, s, t, u) => {
      const { model, travel, state } = setUp<FreeRateTravel>(request)
      const d = model.wireDiameterMm
      const [low = 0, middle = 0, high = 0] = [s, t, u].sort((a, b) => a - b).map(x => diameterOf(d, x))
      const range = coilRange(model, state, travel, middle)
      if (!range) return
      compared++
      expect(massBoundG(model, state, travel, low, high)).toBeLessThanOrEqual(stateMassG(model, fillFreeRate(model, state, travel, middle, range.least)) * (1 + 1e-9))
    }), { numRuns: 5000 })
    expect(compared).toBeGreaterThan(100)
  })

  it('the mass rises with the coils and with the diameter', () => {
    fc.assert(fc.property(oneLoad, share, share, evenly(2, 40), evenly(2, 40), (request, s, t, n, m) => {
      const { model, travel, state } = setUp<FreeRateTravel>(request)
      const d = model.wireDiameterMm
      fc.pre(travel.point.lengthMm > 3 * d)
      const mass = (share: number, coils: number) => stateMassG(model, fillFreeRate(model, state, travel, diameterOf(d, share), coils))
      const lightest = mass(Math.min(s, t), Math.min(n, m))
      expect(lightest).toBeLessThanOrEqual(mass(Math.max(s, t), Math.min(n, m)) * (1 + 1e-12))
      expect(lightest).toBeLessThanOrEqual(mass(Math.min(s, t), Math.max(n, m)) * (1 + 1e-12))
    }), { numRuns: 3000 })
  })
})
