import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { buildExtensionModel } from '../../../shared/spring/mechanics/extension/model'
import { EXTENSION_CHECKS, passesExtensionStopChecks } from '../../../shared/spring/mechanics/extension/checks'
import { createExtensionState, extensionMassG } from '../../../shared/spring/mechanics/extension/state'
import { RISING_CHECKS, carriesAt, couldPass, diameterRange, leastMassG, leastWireMassG, possibleDiameters } from '../../../shared/spring/sizing/extension/bounds'
import { fewestBodyCoils, fillExtension, mostBodyCoils } from '../../../shared/spring/sizing/extension/geometry'
import { resolveExtensionTravel } from '../../../shared/spring/sizing/extension/travel'
import { evenly } from './arbitrary-compression'
import { ASKED, extensionAsks, type Asked, type ExtensionAsk } from './arbitrary-extension'

/*
 * The claims that the search of extension springs stands on (the comments of bounds.ts, geometry.ts and wire-search.ts), tried on
 * random springs, in steps and not: no spring that passes lies where the search does not look.
 */
const share = evenly(0, 1)
const diameterOf = (d: number, s: number) => d * (4 + 16 * s)
const STEPS = [{}, { coilStep: 0.25, diameterStepMm: 0.1 }] as const
const withSteps = fc.constantFrom(...STEPS)

function setUp({ wire, request }: ExtensionAsk, steps: (typeof STEPS)[number]) {
  const stepped = { ...request, ...steps }
  const travel = resolveExtensionTravel(stepped)
  const model = buildExtensionModel(wire, stepped)
  const [first, second] = request.points
  return { model, travel, d: wire.wireDiameterMm, state: createExtensionState(second && first ? first.lengthMm : Number.NaN, (second ?? first)?.lengthMm ?? Number.NaN) }
}

/** A count of coils that the request leaves at a diameter, somewhere between its fewest and its most; NaN where it leaves none. */
function coilsBetween({ model, travel }: ReturnType<typeof setUp>, D: number, s: number): number {
  const fewest = fewestBodyCoils(model, travel, D)
  const most = Math.min(mostBodyCoils(model, travel, D), fewest * 3)
  return most >= fewest * (1 - 1e-11) ? fewest + (most - fewest) * s : Number.NaN
}

it('has a place for every check that can stop', () => {
  const bounded = ['index', 'coils', 'order', 'initial-tension', 'bore', 'rod', 'free-length', 'solid-length']
  // The last two never stop.
  expect([...RISING_CHECKS.map(check => check.code), ...bounded, 'surroundings', 'method'].sort()).toEqual(EXTENSION_CHECKS.map(check => check.code).sort())
})

describe.each(ASKED)('asked for %s', (asked: Asked) => {
  it('the coils that are left fall as the diameter rises', () => {
    fc.assert(fc.property(extensionAsks(asked), withSteps, share, share, (ask, steps, s, t) => {
      const { model, travel, d } = setUp(ask, steps)
      const small = diameterOf(d, Math.min(s, t))
      const large = diameterOf(d, Math.max(s, t))
      expect(fewestBodyCoils(model, travel, large)).toBeLessThanOrEqual(fewestBodyCoils(model, travel, small) * (1 + 1e-9))
      // Where the most is under nought there is no spring on either side.
      const most = mostBodyCoils(model, travel, large)
      if (most > 0) expect(most).toBeLessThanOrEqual(mostBodyCoils(model, travel, small) * (1 + 1e-9))
    }), { numRuns: 3000 })
  })

  it('a diameter that is too large for the loads stays so', () => {
    fc.assert(fc.property(extensionAsks(asked), withSteps, share, share, (ask, steps, s, t) => {
      const { model, travel, state, d } = setUp(ask, steps)
      const carries = (x: number) => carriesAt(model, state, travel, diameterOf(d, x))
      if (carries(Math.max(s, t))) expect(carries(Math.min(s, t))).toBe(true)
    }), { numRuns: 2000 })
  })

  it('a spring that passes lies within the range, its box could pass, and no bound is above its mass', () => {
    let passed = 0
    fc.assert(fc.property(extensionAsks(asked), withSteps, share, share, share, share, share, (ask, steps, s, t, u, v, near) => {
      const at = setUp(ask, steps)
      const { model, travel, state, d } = at
      const [a = 0, , b = 0] = [s, t, u].sort((x, y) => x - y).map(x => diameterOf(d, x))
      // Many have the diameter that the request came from, where more of them pass.
      const range = diameterRange(model, state, travel)
      const D = near < 0.4 ? ask.meanDiameterMm : near < 0.8 && range ? range.low + (range.high - range.low) * t : diameterOf(d, t)
      const n = coilsBetween(at, D, v)
      if (!(n > 0)) return
      fillExtension(model, state, travel, D, n)
      if (!passesExtensionStopChecks(model, state)) return
      passed++
      const massG = extensionMassG(model, state)
      expect(range).not.toBeNull()
      expect(D).toBeGreaterThanOrEqual((range?.low ?? Infinity) * (1 - 1e-8))
      expect(D).toBeLessThanOrEqual((range?.high ?? 0) * (1 + 1e-8))
      const [from, to] = [Math.min(a, D), Math.max(b, D)]
      const fewest = fewestBodyCoils(model, travel, to)
      expect(couldPass(model, travel, from, to, fewest, mostBodyCoils(model, travel, from))).toBe(true)
      expect(couldPass(model, travel, D, D, n, n)).toBe(true)
      expect(leastMassG(model, travel, from, to, fewest)).toBeLessThanOrEqual(massG * (1 + 1e-9))
      expect(leastWireMassG(model, travel)).toBeLessThanOrEqual(massG * (1 + 1e-9))
    }), { numRuns: 8000, seed: 5 })
    expect(passed).toBeGreaterThan(500)
  })

  it('the bounds close on the checks: a box of one spring could pass if and only if the spring does', () => {
    const seen = { passes: 0, fails: 0 }
    fc.assert(fc.property(extensionAsks(asked), withSteps, share, share, share, (ask, steps, t, v, near) => {
      const at = setUp(ask, steps)
      const { model, travel, state, d } = at
      const D = near < 0.3 ? ask.meanDiameterMm : diameterOf(d, t)
      const n = coilsBetween(at, D, v)
      if (!(n > 0) || !carriesAt(model, state, travel, D)) return
      fillExtension(model, state, travel, D, n)
      const passes = passesExtensionStopChecks(model, state)
      seen[passes ? 'passes' : 'fails']++
      // In steps the second load moves with the coils, so a spring may still be too much for its wire at the end of the range.
      if (passes || travel.loadTolerance === 0) expect(couldPass(model, travel, D, D, n, n)).toBe(passes)
    }), { numRuns: 8000, seed: 7 })
    expect(seen.passes).toBeGreaterThan(300)
    expect(seen.fails).toBeGreaterThan(300)
  })
})

it.each(STEPS)('the range of two loads ends where the softest spring that steps leave no longer carries them: %o', (steps) => {
  const ended = { byFatigue: 0, byStress: 0 }
  fc.assert(fc.property(extensionAsks('two-loads'), (ask) => {
    const at = setUp(ask, steps)
    const { model, travel, state } = at
    const range = diameterRange(model, state, travel)
    if (!range || range.high >= (possibleDiameters(model, travel)?.high ?? 0)) return
    // With the most coils the rate is softest, the second load least and the first greatest.
    const failing = (D: number) => {
      fillExtension(model, state, travel, D, mostBodyCoils(model, travel, D))
      return RISING_CHECKS.filter(check => check.applies(model, state) && check.stops(model, state)).map(check => check.code)
    }
    expect(failing(range.high * (1 - 1e-8))).toEqual([])
    const beyond = failing(range.high * (1 + 1e-4))
    expect(beyond).not.toEqual([])
    ended[beyond.includes('fatigue') ? 'byFatigue' : 'byStress']++
  }), { numRuns: 3000, seed: 8 })
  expect(ended.byFatigue).toBeGreaterThan(20)
  expect(ended.byStress).toBeGreaterThan(20)
})

describe('one load alone', () => {
  it('passes, of each diameter, with the fewest coils if with any', () => {
    let passed = 0
    fc.assert(fc.property(extensionAsks('one-load'), share, evenly(1, 2), (ask, s, more) => {
      const { model, travel, state, d } = setUp(ask, {})
      const D = diameterOf(d, s)
      const fewest = fewestBodyCoils(model, travel, D)
      const passes = (n: number) => passesExtensionStopChecks(model, fillExtension(model, state, travel, D, n))
      if (!passes(fewest * more)) return
      passed++
      const massG = extensionMassG(model, state)
      expect(passes(fewest)).toBe(true)
      expect(extensionMassG(model, state)).toBeLessThanOrEqual(massG)
    }), { numRuns: 5000, seed: 6 })
    expect(passed).toBeGreaterThan(100)
  })
})
