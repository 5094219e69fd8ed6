import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluateTorsion, sizeSpring, type SizedDesignOf, type SizingCandidate, type SizingWire, type TorsionInput, type TorsionSizeRequest } from '#shared/spring'
import { TORSION_SEARCH } from '../../../shared/spring/sizing/torsion/search'
import { EASIEST_INDEX } from '../../../shared/spring/sizing/torsion/wire-search'
import { EN_CODES, makeWires } from './springs'

const catalogue = makeWires(...EN_CODES)
const someWires = catalogue.filter((_, i) => i % 6 === 0)
const fewWires = catalogue.filter((_, i) => i % 15 === 3)

const bounded = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined })
const leg = fc.record({ lengthMm: bounded(5, 60), form: fc.constantFrom('straight' as const, 'tangential' as const) })
const conditions = {
  method: fc.constantFrom('en13906' as const, 'wahl' as const),
  duty: maybe(fc.record({ cycles: fc.constantFrom(1e3, 5e5, 1e7) })),
  toleranceGrade: fc.constantFrom(1 as const, 2 as const, 3 as const),
  legs: fc.oneof(fc.constant([]), fc.tuple(leg, leg).map(pair => [...pair])),
  loadOpens: fc.boolean(),
  fit: maybe(fc.record({ boreMm: maybe(bounded(10, 60)), rodMm: maybe(bounded(3, 14)), maxFreeLengthMm: maybe(bounded(10, 80)), maxSolidLengthMm: maybe(bounded(10, 80)) })),
}
const first = { angle: bounded(5, 90), moment: bounded(20, 3000) }
const twoPoints: fc.Arbitrary<TorsionSizeRequest> = fc.record({ ...first, turn: bounded(10, 180), more: bounded(20, 5000), ...conditions })
  .map(({ angle, moment, turn, more, ...rest }) => ({ kind: 'torsion', points: [{ angleDeg: angle, momentNmm: moment }, { angleDeg: angle + turn, momentNmm: moment + more }], ...rest }))
const withRate: fc.Arbitrary<TorsionSizeRequest> = fc.record({ ...first, rateNmmPerDeg: bounded(0.5, 100), ...conditions })
  .map(({ angle, moment, ...rest }) => ({ kind: 'torsion', points: [{ angleDeg: angle, momentNmm: moment }], ...rest }))
const fromFree: fc.Arbitrary<TorsionSizeRequest> = fc.record({ ...first, ...conditions })
  .map(({ angle, moment, ...rest }) => ({ kind: 'torsion', points: [{ angleDeg: angle, momentNmm: moment }], ...rest }))
const anyForm = fc.oneof(twoPoints, withRate, fromFree)

const stops = (input: TorsionInput) => evaluateTorsion(input).checks.filter(c => !c.ok && c.severity === 'stop').map(c => c.code)
const designsOf = (request: TorsionSizeRequest, wires = someWires) =>
  sizeSpring(request, wires, { explainConflict: false }).designs as readonly SizedDesignOf<'torsion'>[]
const rateOf = ({ points: [p1, p2], rateNmmPerDeg }: TorsionSizeRequest) =>
  p1 && p2 ? (p2.momentNmm - p1.momentNmm) / (p2.angleDeg - p1.angleDeg) : rateNmmPerDeg ?? (p1?.momentNmm ?? 0) / (p1?.angleDeg ?? 1)

describe('what a torsion design is', () => {
  it('meets the request and passes every stop check when its spring is evaluated again', () => {
    let found = 0
    fc.assert(fc.property(anyForm, (request) => {
      for (const design of designsOf(request)) {
        found++
        const again = evaluateTorsion(design.spring)
        expect(stops(design.spring)).toEqual([])
        expect(again.rateNmmPerDeg / rateOf(request)).toBeCloseTo(1, 8)
        request.points.forEach((point, i) => expect((again.points[i]?.momentNmm ?? 0) / point.momentNmm).toBeCloseTo(1, 8))
        expect(again.massG).toBeCloseTo(design.objectiveValue, 8)
      }
    }), { numRuns: 150, seed: 31 })
    expect(found).toBeGreaterThan(100)
  }, 60_000)

  it('turns from one point to the other by the angle that was asked, wherever free lies', () => {
    const [design] = designsOf({ kind: 'torsion', points: [{ angleDeg: 10, momentNmm: 400 }, { angleDeg: 70, momentNmm: 1000 }] })
    const [p1, p2] = design?.evaluation.points ?? []
    expect((p2?.angleDeg ?? 0) - (p1?.angleDeg ?? 0)).toBeCloseTo(60, 9)
    // 10 N mm a degree: 400 N mm is 40 degrees from free, so free lies 30 degrees before the place angles are counted from.
    expect(p1?.angleDeg).toBeCloseTo(40, 9)
    expect(design?.evaluation.assumptions.join(' ')).toContain('-30.0 degrees')
  })

  it('takes whole steps of body coils and diameter where they are asked, with moments within 1 %', () => {
    let found = 0
    fc.assert(fc.property(anyForm, (request) => {
      for (const design of designsOf({ ...request, coilStep: 0.25, diameterStepMm: 0.1 })) {
        found++
        expect(design.totalCoils * 4).toBeCloseTo(Math.round(design.totalCoils * 4), 9)
        expect(design.meanDiameterMm * 10).toBeCloseTo(Math.round(design.meanDiameterMm * 10), 9)
        expect(stops(design.spring)).toEqual([])
        request.points.forEach((point, i) => expect(Math.abs((design.evaluation.points[i]?.momentNmm ?? 0) / point.momentNmm - 1)).toBeLessThan(0.010001))
      }
    }), { numRuns: 80, seed: 32 })
    expect(found).toBeGreaterThan(50)
  }, 60_000)
})

describe('the best torsion spring', () => {
  it('is lighter than any of 200 diameters of every wire, has the easiest index of its wire, and no wire that has one is missed', () => {
    let compared = 0
    fc.assert(fc.property(anyForm, (request) => {
      const { designs, searched } = sizeSpring(request, fewWires, { explainConflict: false })
      const rate = rateOf(request)
      const [p1] = request.points
      const turned = request.points.map(p => (p.momentNmm / rate))
      const free = request.points.length === 1 && request.rateNmmPerDeg === undefined ? [p1?.angleDeg ?? 0] : turned
      let lightest = Infinity
      let feasible = 0
      for (const wire of fewWires) {
        const d = wire.wireDiameterMm
        let any = false
        let easiest = Infinity
        for (let i = 0; i <= 200; i++) {
          const D = d * (4 + (16 * i) / 200)
          const shape = { kind: 'torsion' as const, material: wire.material, wireDiameterMm: d, meanDiameterMm: D, legs: request.legs, method: request.method }
          const one = evaluateTorsion({ ...shape, bodyCoils: 1 })
          const bodyCoils = (one.rateNmmPerDeg * one.activeCoils) / rate - one.legCoils
          if (!(bodyCoils >= 0.1) || bodyCoils > 900) continue
          const result = evaluateTorsion({
            ...shape, bodyCoils, duty: request.duty, toleranceGrade: request.toleranceGrade, fit: request.fit, loadOpens: request.loadOpens,
            points: free.map(angleDeg => ({ angleDeg })),
          })
          if (result.checks.some(c => !c.ok && c.severity === 'stop')) continue
          any = true
          lightest = Math.min(lightest, result.massG)
          easiest = Math.min(easiest, Math.abs(D / d - EASIEST_INDEX))
        }
        if (!any) continue
        feasible++
        const own = designsOf(request, [wire])[0]
        expect(Math.abs((own?.evaluation.springIndex ?? Infinity) - EASIEST_INDEX)).toBeLessThanOrEqual(easiest + 1e-9)
      }
      expect(searched.feasibleWires).toBeGreaterThanOrEqual(feasible)
      if (lightest === Infinity) return
      compared++
      expect(designs[0]?.objectiveValue).toBeLessThanOrEqual(lightest * (1 + 1e-9))
    }), { numRuns: 40, seed: 33 })
    expect(compared).toBeGreaterThan(10)
  }, 120_000)
})

/** The lightest and the least stressed of all stepped springs of a wire, found by trying every pair; the moments from the rate alone. */
function bestStepped(request: TorsionSizeRequest, wire: SizingWire, coilStep: number, diameterStepMm: number) {
  const d = wire.wireDiameterMm
  const [p1, p2] = request.points
  const best = { count: 0, mass: Infinity, stress: Infinity, ease: Infinity }
  if (!p1) return best
  const oneCoil = evaluateTorsion({ kind: 'torsion', material: wire.material, wireDiameterMm: d, meanDiameterMm: 10 * d, bodyCoils: 1, method: request.method }).rateNmmPerDeg
  for (let i = Math.ceil((4 * d) / diameterStepMm); i * diameterStepMm <= 20 * d + 1e-9; i++) {
    for (let j = 1; j * coilStep <= 80; j++) {
      const shape: TorsionInput = {
        kind: 'torsion', material: wire.material, wireDiameterMm: d, meanDiameterMm: i * diameterStepMm, bodyCoils: j * coilStep, legs: request.legs, method: request.method,
        loadOpens: request.loadOpens, duty: request.duty, toleranceGrade: request.toleranceGrade, fit: request.fit,
      }
      const asked = rateOf(request)
      if (Math.abs(rateFrom(oneCoil, shape) / asked - 1) > 0.11) continue
      const rate = evaluateTorsion(shape).rateNmmPerDeg
      // Two moments share the error; one is exact where a rate is asked; one from free goes with the rate.
      const error = p2 ? (rate * (p2.angleDeg - p1.angleDeg) - (p2.momentNmm - p1.momentNmm)) / (p1.momentNmm + p2.momentNmm) : rate / asked - 1
      if (Math.abs(error) > 0.01 || Math.abs(rate / asked - 1) > 0.1) continue
      const moments = p2 ? [p1.momentNmm * (1 - error), p2.momentNmm * (1 + error)] : [request.rateNmmPerDeg === undefined ? p1.angleDeg * rate : p1.momentNmm]
      const result = evaluateTorsion({ ...shape, points: moments.map(momentNmm => ({ momentNmm })) })
      if (result.checks.some(c => !c.ok && c.severity === 'stop')) continue
      best.count++
      best.mass = Math.min(best.mass, result.massG)
      best.stress = Math.min(best.stress, result.points[result.points.length - 1]?.bendingStressMpa ?? Infinity)
    }
  }
  return best
}

// The rate of a pair from that of one coil, so that most pairs need no evaluation.
const rateFrom = (one: number, { wireDiameterMm: d, meanDiameterMm: D, bodyCoils = 1, legs = [] }: TorsionInput) =>
  (one * 10 * d) / (D * (bodyCoils + legs.reduce((sum, l) => sum + l.lengthMm, 0) / (3 * Math.PI * D)))

describe('the best torsion spring in steps', () => {
  it('is the lightest, or the least stressed, of every pair of coils and diameter; and all of them are found', () => {
    let compared = 0
    fc.assert(fc.property(anyForm, fc.constantFrom(...catalogue), (request, wire) => {
      const stepped = { ...request, coilStep: 0.5, diameterStepMm: 0.5, fit: { ...request.fit, maxSolidLengthMm: Math.min(request.fit?.maxSolidLengthMm ?? Infinity, 80 * wire.wireDiameterMm) } }
      const tried = bestStepped(stepped, wire, 0.5, 0.5)
      let every = 0
      const price = (candidate: SizingCandidate) => {
        every++
        return candidate.massG
      }
      const [byMass] = designsOf(stepped, [wire])
      const [byStress] = sizeSpring(stepped, [wire], { objective: 'stress', explainConflict: false }).designs
      sizeSpring(stepped, [wire], { objective: price, explainConflict: false })
      expect(every).toBe(tried.count)
      expect(TORSION_SEARCH.prepare(stepped).leastMassG(wire)).toBeLessThanOrEqual(tried.mass)
      expect(byMass === undefined).toBe(tried.count === 0)
      if (tried.count === 0) return
      compared++
      expect((byMass?.objectiveValue ?? Infinity) / tried.mass).toBeCloseTo(1, 8)
      expect((byStress?.objectiveValue ?? Infinity) / tried.stress).toBeCloseTo(1, 8)
    }), { numRuns: 300, seed: 34 })
    expect(compared).toBeGreaterThan(30)
  }, 120_000)

  const wireOf = (wireDiameterMm: number) => ({ id: 'w', material: 'EN10270-1-SH' as const, wireDiameterMm })
  it.each([
    // 0.7 of 1980 MPa is 1088.5 N mm in 2 mm wire; steps may lessen a moment of 1093 below it.
    ['a moment just over the limit of stress', wireOf(2), { kind: 'torsion', points: [{ angleDeg: 0, momentNmm: 500 }, { angleDeg: 55, momentNmm: 1093 }], fit: { maxSolidLengthMm: 60 } }],
    ['a rod that the coils only just clear', wireOf(5), { kind: 'torsion', points: [{ angleDeg: 30, momentNmm: 6000 }], loadOpens: true, fit: { rodMm: 33, boreMm: 55, maxSolidLengthMm: 90 } }],
  ] as const satisfies readonly (readonly [string, SizingWire, TorsionSizeRequest])[])('misses no pair with %s', (_, wire, request) => {
    const tried = bestStepped(request, wire, 0.25, 0.1)
    const found = TORSION_SEARCH.prepare({ ...request, coilStep: 0.25, diameterStepMm: 0.1 }).search(wire, 'every')
    expect(tried.count).toBeGreaterThan(10)
    expect(found.length).toBe(tried.count)
  })

  it('with one of the two in steps keeps the rate exact, and takes the step nearest to the easiest index', () => {
    const request: TorsionSizeRequest = { kind: 'torsion', points: [{ angleDeg: 90, momentNmm: 900 }], legs: [{ lengthMm: 20, form: 'tangential' }, { lengthMm: 25, form: 'tangential' }] }
    const wire = { id: 'w', material: 'EN10270-1-SH' as const, wireDiameterMm: 2 }
    const [byDiameter] = designsOf({ ...request, diameterStepMm: 0.3 }, [wire])
    expect(byDiameter?.meanDiameterMm).toBeCloseTo(15.9, 9)
    expect(byDiameter?.evaluation.rateNmmPerDeg).toBeCloseTo(10, 9)
    const [byCoils] = designsOf({ ...request, coilStep: 1 }, [wire])
    expect(byCoils?.totalCoils).toBe(Math.round(byCoils?.totalCoils ?? 0))
    expect(byCoils?.evaluation.rateNmmPerDeg).toBeCloseTo(10, 9)
    // The counts beside it lie further from the index of 8.
    const K = (byCoils?.meanDiameterMm ?? 0) * (byCoils?.totalCoils ?? 0)
    for (const other of [-1, 1]) expect(Math.abs(K / ((byCoils?.totalCoils ?? 0) + other) - 16)).toBeGreaterThan(Math.abs((byCoils?.meanDiameterMm ?? 0) - 16))
    expect(byCoils?.evaluation.assumptions.join(' ')).toContain('No angle between the legs was asked for')
  })
})

describe('a bore wider than the table of tolerances', () => {
  it('admits a spring over 200 mm where none is counted, though one just under is refused', () => {
    // Outside 200 + 20 mm and 2.9 mm of grade 2 to 200 mm (EN 15800); beyond it no tolerance is published.
    const wire = { id: 'w', material: 'EN10270-1-SH' as const, wireDiameterMm: 20 }
    const request: TorsionSizeRequest = { kind: 'torsion', points: [{ angleDeg: 45, momentNmm: 500_000 }], fit: { boreMm: 221.5, rodMm: 173 } }
    const [design] = designsOf(request, [wire])
    expect(design?.meanDiameterMm).toBeGreaterThan(200)
    expect(design?.meanDiameterMm).toBeLessThanOrEqual(201.5 * (1 + 1e-9))
    const smaller = (D: number) => ({ ...(design as SizedDesignOf<'torsion'>).spring, meanDiameterMm: D })
    expect(stops(smaller(199.5))).toEqual(['bore', 'rod'])
    expect(stops(smaller(198.5))).toEqual(['rod'])
  })
})

describe('why no torsion spring fits', () => {
  it('names the rod among what clashes, and a thinner one that admits a spring', () => {
    const request: TorsionSizeRequest = { kind: 'torsion', points: [{ angleDeg: 90, momentNmm: 900 }], fit: { rodMm: 40, boreMm: 44 } }
    const { conflict } = sizeSpring(request, catalogue)
    expect(conflict?.requirements).toContain('fit.rodMm')
    const thinner = conflict?.changes.find(change => change.path === 'fit.rodMm')
    expect(thinner?.to).toBeLessThan(40)
    expect(sizeSpring({ ...request, fit: { ...request.fit, rodMm: thinner?.to } }, catalogue).designs.length).toBeGreaterThan(0)
  })
})
