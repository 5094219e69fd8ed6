import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checkSizeRequirement, evaluateExtension, sizeSpring, type ExtensionInput, type ExtensionSizeRequest, type SizedDesignOf } from '#shared/spring'
import { HOOK_FORMS } from '../../../shared/spring/codes'
import { EN_CODES, makeWires } from './springs'

const catalogue = makeWires(...EN_CODES)
const someWires = catalogue.filter((_, i) => i % 6 === 0)

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
const noLoad: fc.Arbitrary<ExtensionSizeRequest> = fc.record({ freeLengthMm: bounded(15, 150), rateNPerMm: bounded(0.1, 10), ...conditions })
  .map(rest => ({ kind: 'extension', points: [], ...rest }))
const anyForm = fc.oneof(twoPoints, withRate, withFreeLength, oneLoad, noLoad)

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

describe('the best extension spring', () => {
  it('is the same every time, whatever the order of the wires', () => {
    const request: ExtensionSizeRequest = { kind: 'extension', points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 80, forceN: 50 }] }
    const answer = (wires: typeof catalogue) => designsOf(request, wires).map(d => [d.wireId, d.meanDiameterMm, d.objectiveValue])
    expect(answer([...catalogue].reverse())).toEqual(answer(catalogue))
  })
})

describe('a rate and a free length without a load', () => {
  const request: ExtensionSizeRequest = { kind: 'extension', points: [], rateNPerMm: 1.5, freeLengthMm: 50 }

  it('give both, with a tension in the middle of what is sensible, and say so', () => {
    const [best] = designsOf(request, catalogue)
    expect(best).toBeDefined()
    const e = best?.evaluation
    expect(e?.rateNPerMm).toBeCloseTo(1.5, 7)
    expect(e?.insideHooksFreeLengthMm).toBeCloseTo(50, 6)
    const [low, high] = e?.initialStressRangeMpa ?? [0, 0]
    expect(e?.initialStressMpa).toBeCloseTo((low + high) / 2, 9)
    expect(e?.assumptions.join(' ')).toContain('middle of the sensible range')
    expect(e?.points).toEqual([])
  })

  it('may leave the length to steps, and then say by how much', () => {
    for (const steps of [{ coilStep: 0.25 }, { diameterStepMm: 0.1 }, { coilStep: 0.25, diameterStepMm: 0.1 }]) {
      const designs = designsOf({ ...request, ...steps }, catalogue)
      expect(designs.length).toBeGreaterThan(0)
      for (const { evaluation } of designs) {
        expect(Math.abs(evaluation.insideHooksFreeLengthMm / 50 - 1)).toBeLessThan(0.010001)
        expect(Math.abs(evaluation.rateNPerMm / 1.5 - 1)).toBeLessThan(0.010001)
        expect(evaluation.assumptions.join(' ')).toContain('by up to 1 %')
      }
    }
  })

  it('are both needed, and both named when no spring has them', () => {
    expect(checkSizeRequirement({ ...request, rateNPerMm: undefined }).map(({ path }) => path)).toEqual([['points']])
    expect(checkSizeRequirement(request)).toEqual([])
    const { conflict } = sizeSpring({ ...request, rateNPerMm: 200 }, someWires)
    expect(conflict?.requirements).toEqual(['rateNPerMm', 'freeLengthMm'])
    expect(conflict?.changes.length).toBeGreaterThan(0)
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
