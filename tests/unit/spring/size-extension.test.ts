import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluateExtension, sizeSpring, type ExtensionInput, type ExtensionSizeRequest, type SizedDesignOf } from '#shared/spring'
import { hookLengthMm } from '../../../shared/spring/mechanics/extension/hooks'
import { HOOK_FORMS } from '../../../shared/spring/codes'
import { EN_CODES, makeWires } from './springs'

const catalogue = makeWires(...EN_CODES)
const someWires = catalogue.filter((_, i) => i % 6 === 0)
const fewWires = catalogue.filter((_, i) => i % 15 === 3)

const bounded = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined })
const conditions = {
  method: fc.constantFrom('en13906' as const, 'wahl' as const),
  duty: maybe(fc.record({ cycles: fc.constantFrom(1e3, 1e6) })),
  toleranceGrade: fc.constantFrom(1 as const, 2 as const, 3 as const),
  hook: maybe(fc.record({ form: fc.constantFrom(...HOOK_FORMS) })),
  fit: maybe(fc.record({ boreMm: maybe(bounded(8, 60)), rodMm: maybe(bounded(2, 10)), maxFreeLengthMm: maybe(bounded(30, 200)), maxSolidLengthMm: maybe(bounded(15, 100)) })),
}
const first = { L: bounded(25, 150), F: bounded(2, 200) }
const twoPoints: fc.Arbitrary<ExtensionSizeRequest> = fc.record({ ...first, travel: bounded(5, 80), more: bounded(2, 200), ...conditions })
  .map(({ L, F, travel, more, ...rest }) => ({ kind: 'extension', points: [{ lengthMm: L, forceN: F }, { lengthMm: L + travel, forceN: F + more }], ...rest }))
const withRate: fc.Arbitrary<ExtensionSizeRequest> = fc.record({ ...first, rateNPerMm: bounded(0.1, 10), ...conditions })
  .map(({ L, F, ...rest }) => ({ kind: 'extension', points: [{ lengthMm: L, forceN: F }], ...rest }))
const withFreeLength: fc.Arbitrary<ExtensionSizeRequest> = fc.record({ ...first, shorter: bounded(2, 60), ...conditions })
  .map(({ L, F, shorter, ...rest }) => ({ kind: 'extension', points: [{ lengthMm: L, forceN: F }], freeLengthMm: Math.max(8, L - shorter), ...rest }))
const oneLoad: fc.Arbitrary<ExtensionSizeRequest> = fc.record({ ...first, ...conditions })
  .map(({ L, F, ...rest }) => ({ kind: 'extension', points: [{ lengthMm: L, forceN: F }], ...rest }))
const anyForm = fc.oneof(twoPoints, withRate, withFreeLength, oneLoad)

const stops = (input: ExtensionInput) => evaluateExtension(input).checks.filter(c => !c.ok && c.severity === 'stop').map(c => c.code)
const designsOf = (request: ExtensionSizeRequest, wires = someWires) =>
  sizeSpring(request, wires, { explainConflict: false }).designs as readonly SizedDesignOf<'extension'>[]

describe('what an extension design is', () => {
  it('meets the request and passes every stop check when its spring is evaluated again', () => {
    let found = 0
    fc.assert(fc.property(anyForm, (request) => {
      for (const design of designsOf(request)) {
        found++
        const again = evaluateExtension(design.spring)
        expect(stops(design.spring)).toEqual([])
        request.points.forEach((point, i) => expect((again.points[i]?.forceN ?? 0) / point.forceN).toBeCloseTo(1, 7))
        if (request.rateNPerMm !== undefined) expect(again.rateNPerMm / request.rateNPerMm).toBeCloseTo(1, 8)
        if (request.freeLengthMm !== undefined) expect(design.freeLengthMm / request.freeLengthMm).toBeCloseTo(1, 8)
        expect(again.massG).toBeCloseTo(design.objectiveValue, 8)
      }
    }), { numRuns: 150, seed: 11 })
    expect(found).toBeGreaterThan(60)
  }, 60_000)

  it('takes whole steps of body coils and diameter where they are asked, with forces within 1 %', () => {
    let found = 0
    fc.assert(fc.property(anyForm, (request) => {
      for (const design of designsOf({ ...request, coilStep: 0.25, diameterStepMm: 0.1 })) {
        found++
        expect(design.totalCoils * 4).toBeCloseTo(Math.round(design.totalCoils * 4), 9)
        expect(design.meanDiameterMm * 10).toBeCloseTo(Math.round(design.meanDiameterMm * 10), 9)
        expect(stops(design.spring)).toEqual([])
        request.points.forEach((point, i) => expect(Math.abs((design.evaluation.points[i]?.forceN ?? 0) / point.forceN - 1)).toBeLessThan(0.010001))
      }
    }), { numRuns: 80, seed: 12 })
    expect(found).toBeGreaterThan(30)
  }, 60_000)
})

/** The lightest passing spring over a grid of diameters (and of coils, where the request leaves them), the slow way: by evaluating each. */
function lightestOnGrid(request: ExtensionSizeRequest): { massG: number, feasibleWires: number } {
  let massG = Infinity
  let feasibleWires = 0
  const [p1, p2] = request.points
  if (!p1) throw new Error('a point is needed')
  const form = request.hook?.form ?? 'full-loop'
  for (const wire of fewWires) {
    const d = wire.wireDiameterMm
    let any = false
    for (let i = 0; i <= 80; i++) {
      const D = d * (4 + (16 * i) / 80)
      const hooks = 2 * hookLengthMm(form, D, d)
      // One coil tells rate and hooks' coils; the rest follows by proportion.
      const one = evaluateExtension({ kind: 'extension', material: wire.material, wireDiameterMm: d, meanDiameterMm: D, bodyCoils: 1, initialTensionN: 0 })
      const perCoil = one.rateNPerMm * one.activeCoils
      const rate = p2 ? (p2.forceN - p1.forceN) / (p2.lengthMm - p1.lengthMm) : request.rateNPerMm
      const counts = rate !== undefined
        ? [perCoil / rate - one.coilsEquivalent]
        : request.freeLengthMm !== undefined
          ? [(request.freeLengthMm - hooks) / d - 1]
          : Array.from({ length: 60 }, (_, k) => 3 * 1.06 ** k)
      for (const bodyCoils of counts) {
        if (!(bodyCoils >= 0.1) || bodyCoils > 900) continue
        const freeLengthMm = (bodyCoils + 1) * d + hooks
        const R = perCoil / (bodyCoils + one.coilsEquivalent)
        const result = evaluateExtension({
          kind: 'extension', material: wire.material, wireDiameterMm: d, meanDiameterMm: D, bodyCoils, insideHooksFreeLengthMm: freeLengthMm,
          initialTensionN: p1.forceN - R * (p1.lengthMm - freeLengthMm), hook: request.hook, method: request.method, duty: request.duty,
          toleranceGrade: request.toleranceGrade, fit: request.fit, points: request.points.map(({ lengthMm }) => ({ lengthMm })),
        })
        if (result.checks.some(c => !c.ok && c.severity === 'stop')) continue
        any = true
        massG = Math.min(massG, result.massG)
      }
    }
    if (any) feasibleWires++
  }
  return { massG, feasibleWires }
}

describe('the best extension spring', () => {
  it.each([['two loads', twoPoints], ['a load and a rate', withRate], ['a load and a free length', withFreeLength]] as const)(
    'is lighter than any of 80 diameters of every wire, and no wire that has one is missed: %s', (_, form) => {
      let compared = 0
      fc.assert(fc.property(form, (request) => {
        const { designs, searched } = sizeSpring(request, fewWires, { explainConflict: false })
        const grid = lightestOnGrid(request)
        expect(searched.feasibleWires).toBeGreaterThanOrEqual(grid.feasibleWires)
        if (grid.massG === Infinity) return
        compared++
        expect(designs[0]?.objectiveValue).toBeLessThanOrEqual(grid.massG * 1.001)
      }), { numRuns: 60, seed: 21 })
      expect(compared).toBeGreaterThan(3)
    }, 120_000)

  it('is lighter than any of 80 diameters and 60 counts of coils where one load is all that is asked', () => {
    let compared = 0
    fc.assert(fc.property(oneLoad, (request) => {
      const { designs } = sizeSpring(request, fewWires, { explainConflict: false })
      const grid = lightestOnGrid(request)
      if (grid.massG === Infinity) return
      compared++
      expect(designs[0]?.objectiveValue).toBeLessThanOrEqual(grid.massG * 1.001)
    }), { numRuns: 8, seed: 22 })
    expect(compared).toBeGreaterThan(2)
  }, 120_000)

  it('is the same every time, whatever the order of the wires', () => {
    const request: ExtensionSizeRequest = { kind: 'extension', points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 80, forceN: 50 }] }
    const answer = (wires: typeof catalogue) => designsOf(request, wires).map(d => [d.wireId, d.meanDiameterMm, d.objectiveValue])
    expect(answer([...catalogue].reverse())).toEqual(answer(catalogue))
  })
})

describe('why no extension spring fits', () => {
  it('names a smallest clash and changes that give a spring', () => {
    const request: ExtensionSizeRequest = { kind: 'extension', points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 80, forceN: 50 }], fit: { boreMm: 4 } }
    const { conflict } = sizeSpring(request, catalogue)
    expect(conflict?.requirements).toContain('fit.boreMm')
    const widened = conflict?.changes.find(change => change.path === 'fit.boreMm')
    expect(widened?.to).toBeGreaterThan(4)
    expect(sizeSpring({ ...request, fit: { boreMm: widened?.to } }, catalogue).designs.length).toBeGreaterThan(0)
    expect(sizeSpring({ ...request, fit: { boreMm: (widened?.to ?? 0) * 0.97 } }, catalogue, { explainConflict: false }).designs).toEqual([])
  })
})
