import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluateTorsion, sizeSpring, type SizedDesignOf, type TorsionInput, type TorsionSizeRequest } from '#shared/spring'
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
