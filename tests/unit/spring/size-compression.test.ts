import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  describeConflict, evaluateCompression, getMaterial, minimumTensileStrengthMpa, modulusMpa, sizeSpring,
  type CompressionInput, type CompressionSizeRequest, type SizedDesign, type SizedDesignOf, type SizingWire,
} from '#shared/spring'
import { uncoveredChecks } from '../../../shared/spring/sizing/compression/fixed-travel'
import { EN_CODES, makeRequest, makeWires } from './springs'

const catalogue = makeWires(...EN_CODES)
// Enough for properties that run a hundred times: every fifth wire, all materials and sizes among them.
const someWires = catalogue.filter((_, i) => i % 5 === 0)

/** The design as a caller of evaluate would write it down. */
function asInput(request: CompressionSizeRequest, design: SizedDesign): CompressionInput {
  return {
    kind: 'compression',
    material: design.material,
    wireDiameterMm: design.wireDiameterMm,
    meanDiameterMm: design.meanDiameterMm,
    activeCoils: design.activeCoils,
    totalCoils: design.totalCoils,
    freeLengthMm: design.freeLengthMm,
    points: request.points.map(p => ({ lengthMm: p.lengthMm })),
    ends: request.ends,
    method: request.method,
    duty: request.duty,
    fit: request.fit,
    shotPeened: request.shotPeened,
    preset: request.preset,
    temperatureC: request.temperatureC,
    toleranceGrade: request.toleranceGrade,
    seatingCoefficient: request.seatingCoefficient,
    guided: request.guided,
    solidSafe: request.solidSafe,
  }
}

const stops = (input: CompressionInput) => evaluateCompression(input).checks.filter(c => !c.ok && c.severity === 'stop').map(c => c.code)

const bounded = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined })
const conditions = {
  ends: fc.constantFrom('closed-ground' as const, 'closed' as const, 'open' as const, 'open-ground' as const),
  method: fc.constantFrom('en13906' as const, 'wahl' as const),
  duty: maybe(fc.record({ cycles: fc.constantFrom(1e3, 5e4, 1e6) })),
  shotPeened: fc.boolean(),
  preset: fc.boolean(),
  toleranceGrade: fc.constantFrom(1 as const, 2 as const, 3 as const),
  seatingCoefficient: fc.constantFrom(0.5 as const, 0.707 as const, 1 as const, 2 as const),
  fit: maybe(fc.record({ boreMm: maybe(bounded(15, 60)), rodMm: maybe(bounded(3, 14)), maxSolidLengthMm: maybe(bounded(10, 60)), maxFreeLengthMm: maybe(bounded(40, 200)) })),
}
const twoPoints: fc.Arbitrary<CompressionSizeRequest> = fc
  .record({ L2: bounded(10, 60), travel: bounded(2, 40), F1: bounded(1, 300), more: bounded(2, 500), ...conditions })
  .map(({ L2, travel, F1, more, ...rest }) => ({
    kind: 'compression', points: [{ lengthMm: L2 + travel, forceN: F1 }, { lengthMm: L2, forceN: F1 + more }], ...rest,
  }))
const anyForm: fc.Arbitrary<CompressionSizeRequest> = fc.oneof(
  twoPoints,
  fc.record({ L: bounded(10, 80), F: bounded(1, 300), rateNPerMm: bounded(0.2, 50), ...conditions })
    .map(({ L, F, ...rest }) => ({ kind: 'compression' as const, points: [{ lengthMm: L, forceN: F }], ...rest })),
  fc.record({ rateNPerMm: bounded(0.2, 50), freeLengthMm: bounded(15, 150), ...conditions })
    .map(rest => ({ kind: 'compression' as const, points: [], ...rest })),
  fc.record({ L: bounded(10, 80), F: bounded(1, 300), ...conditions })
    .map(({ L, F, ...rest }) => ({ kind: 'compression' as const, points: [{ lengthMm: L, forceN: F }], ...rest })),
)

describe('what a design is', () => {
  it('meets the request and passes every stop check when it is evaluated again', () => {
    let found = 0
    fc.assert(fc.property(anyForm, (request) => {
      const { designs } = sizeSpring(request, someWires, { explainConflict: false })
      for (const design of designs) {
        found++
        const again = evaluateCompression(asInput(request, design))
        expect(stops(asInput(request, design))).toEqual([])
        request.points.forEach((point, i) => expect((again.points[i]?.forceN ?? 0) / point.forceN).toBeCloseTo(1, 8))
        if (request.rateNPerMm !== undefined) expect(again.rateNPerMm / request.rateNPerMm).toBeCloseTo(1, 9)
        if (request.freeLengthMm !== undefined) expect(design.freeLengthMm).toBe(request.freeLengthMm)
        expect(again.massG).toBeCloseTo(design.objectiveValue, 8)
      }
    }), { numRuns: 120 })
    expect(found).toBeGreaterThan(60)
  }, 60_000)

  it('takes only whole steps of coils and diameter where they are asked, with forces within 1 %', () => {
    let found = 0
    fc.assert(fc.property(anyForm, (request) => {
      const steps = { ...request, coilStep: 0.25, diameterStepMm: 0.1 }
      for (const design of sizeSpring(steps, someWires, { explainConflict: false }).designs) {
        found++
        expect(design.activeCoils * 4).toBeCloseTo(Math.round(design.activeCoils * 4), 9)
        expect(design.meanDiameterMm * 10).toBeCloseTo(Math.round(design.meanDiameterMm * 10), 9)
        expect(stops(asInput(request, design))).toEqual([])
        request.points.forEach((point, i) =>
          expect(Math.abs(((design as SizedDesignOf<'compression'>).evaluation.points[i]?.forceN ?? 0) / point.forceN - 1)).toBeLessThan(0.010001))
      }
    }), { numRuns: 80 })
    expect(found).toBeGreaterThan(40)
  }, 60_000)

  it('makes the rate exact where only coils or only the diameter go in steps', () => {
    for (const step of [{ coilStep: 0.25 }, { diameterStepMm: 0.1 }]) {
      const [design] = sizeSpring(makeRequest(step), catalogue).designs
      expect((design as SizedDesignOf<'compression'>).evaluation.rateNPerMm).toBeCloseTo(5, 9)
    }
  })
})

describe('what is best', () => {
  it('finds no wire and diameter lighter than the first design by trying 300 diameters of every wire', () => {
    let compared = 0
    fc.assert(fc.property(twoPoints, (request) => {
      const wires = catalogue.filter((_, i) => i % 12 === 0)
      const { designs, searched } = sizeSpring(request, wires, { explainConflict: false })
      const [p1, p2] = request.points
      if (!p1 || !p2) return
      const rate = (p2.forceN - p1.forceN) / (p1.lengthMm - p2.lengthMm)
      let lightest = Infinity
      let feasible = 0
      for (const wire of wires) {
        const G = modulusMpa(getMaterial(wire.material).shearModulus, wire.wireDiameterMm)
        let any = false
        for (let i = 0; i <= 300; i++) {
          const D = wire.wireDiameterMm * (4 + (16 * i) / 300)
          const n = (G * wire.wireDiameterMm ** 4) / (8 * D ** 3 * rate)
          if (n < 2 || n > 1000) continue
          const end = request.ends === 'open' ? 0 : request.ends === 'open-ground' ? 1 : 2
          const spring = asInput(request, {
            ...designs[0], material: wire.material, wireDiameterMm: wire.wireDiameterMm, meanDiameterMm: D, activeCoils: n,
            totalCoils: n + end, freeLengthMm: p1.lengthMm + p1.forceN / rate,
          } as SizedDesign)
          const result = evaluateCompression(spring)
          if (result.checks.some(c => !c.ok && c.severity === 'stop')) continue
          any = true
          lightest = Math.min(lightest, result.massG)
        }
        if (any) feasible++
      }
      expect(searched.feasibleWires).toBeGreaterThanOrEqual(feasible)
      if (lightest < Infinity) {
        compared++
        expect(designs[0]?.objectiveValue).toBeLessThanOrEqual(lightest * (1 + 1e-9))
      }
    }), { numRuns: 25 })
    expect(compared).toBeGreaterThan(2)
  }, 60_000)

  it('finds no lighter spring for one free load on a grid of diameters and coils', () => {
    const request: CompressionSizeRequest = { kind: 'compression', points: [{ lengthMm: 40, forceN: 50 }], fit: { boreMm: 18 } }
    const wires = makeWires('EN10270-1-SH').filter(w => w.wireDiameterMm >= 0.8 && w.wireDiameterMm <= 3)
    const best = sizeSpring(request, wires).designs[0]?.objectiveValue ?? Number.NaN
    let lightest = Infinity
    for (const wire of wires) {
      const d = wire.wireDiameterMm
      for (let i = 0; i <= 160; i++) {
        for (let j = 0; j <= 160; j++) {
          const D = d * (4 + (16 * i) / 160)
          const n = 2 + (j * 38) / 160
          const rate = (81_500 * d ** 4) / (8 * D ** 3 * n)
          const spring: CompressionInput = {
            kind: 'compression', material: wire.material, wireDiameterMm: d, meanDiameterMm: D, activeCoils: n, freeLengthMm: 40 + 50 / rate,
            points: [{ lengthMm: 40 }], fit: request.fit,
          }
          if (D + d > 18 || stops(spring).length > 0) continue
          lightest = Math.min(lightest, evaluateCompression(spring).massG)
        }
      }
    }
    expect(lightest).toBeLessThan(Infinity)
    expect(best).toBeLessThanOrEqual(lightest * 1.001)
    expect(best).toBeGreaterThan(lightest * 0.9)
  }, 60_000)

  it('orders designs by the objective and returns as many as asked', () => {
    for (const objective of ['mass', 'stress'] as const) {
      const { designs } = sizeSpring(makeRequest({ limit: 20 }), catalogue, { objective })
      expect(designs).toHaveLength(20)
      const values = designs.map(d => d.objectiveValue)
      expect([...values].sort((a, b) => a - b)).toEqual(values)
    }
    const stress = sizeSpring(makeRequest(), catalogue, { objective: 'stress' }).designs[0] as SizedDesignOf<'compression'> | undefined
    expect(stress?.evaluation.points[1]?.stressMpa).toBeCloseTo(stress?.objectiveValue ?? Number.NaN, 9)
  })

  it('serves a caller\'s objective, hands back the caller\'s wire and skips candidates without a price', () => {
    const priced = catalogue.map(wire => ({ ...wire, pricePerKg: wire.material === 'EN10270-1-SL' ? '1.00' : '50.00' }))
    const { designs } = sizeSpring(makeRequest({ limit: 20 }), priced, {
      objective: c => (c.wire.material === 'EN10270-1-SH' ? Number.NaN : (c.massG / 1000) * Number(c.wire.pricePerKg)),
    })
    expect(designs[0]?.wire.pricePerKg).toBe('1.00')
    expect(designs.some(d => d.material === 'EN10270-1-SH')).toBe(false)
  })

  it('gives the same answer whatever the order of the wires', () => {
    const request = makeRequest({ fit: { boreMm: 25 } })
    const forward = sizeSpring(request, catalogue)
    const backward = sizeSpring(request, [...catalogue].reverse())
    expect(backward).toEqual(forward)
  })

  it('has a place in the search for every check that can stop', () => {
    expect(uncoveredChecks()).toEqual([])
  })

  it('searches no wire outside its material\'s data', () => {
    const outside: SizingWire[] = [{ id: 'x', material: 'EN10270-1-SL', wireDiameterMm: 0.9 }]
    expect(minimumTensileStrengthMpa(getMaterial('EN10270-1-SL'), 0.9).known).toBe(false)
    expect(sizeSpring(makeRequest(), outside, { explainConflict: false }).designs).toEqual([])
  })
})

describe('when nothing fits', () => {
  it('names bore and rod alone where no wire goes between them', () => {
    const { conflict } = sizeSpring(makeRequest({ fit: { boreMm: 10.3, rodMm: 10 } }), catalogue)
    expect(conflict?.requirements).toEqual(['fit.boreMm', 'fit.rodMm'])
  })

  it('names a set that clashes although every smaller part of it gives a spring, and changes that work', () => {
    const request = makeRequest({ fit: { boreMm: 14, rodMm: 12, maxFreeLengthMm: 90 }, temperatureC: 60 })
    const { designs, conflict } = sizeSpring(request, catalogue)
    expect(designs).toEqual([])
    expect(conflict?.requirements).toContain('fit.boreMm')
    expect(conflict?.requirements).toContain('fit.rodMm')
    expect(conflict?.requirements).not.toContain('fit.maxFreeLengthMm')
    expect(conflict?.requirements).not.toContain('temperatureC')
    const bore = conflict?.changes.find(c => c.path === 'fit.boreMm')
    expect(bore?.to).toBeGreaterThan(14)
    // The change is the least: a little less gives nothing.
    const fit = { ...request.fit }
    expect(sizeSpring({ ...request, fit: { ...fit, boreMm: bore?.to } }, catalogue).designs.length).toBeGreaterThan(0)
    expect(sizeSpring({ ...request, fit: { ...fit, boreMm: (bore?.to ?? 0) * 0.98 } }, catalogue, { explainConflict: false }).designs).toEqual([])
    for (const change of conflict?.changes ?? []) {
      expect(change.design.evaluation.checks.filter(c => !c.ok && c.severity === 'stop')).toEqual([])
    }
    const sentences = describeConflict(conflict ?? { requirements: [], changes: [] }, request)
    expect(sentences[0]).toContain('the bore of 14 mm')
    expect(sentences[0]).toContain('the rod of 12 mm')
    expect(sentences.length).toBe(1 + (conflict?.changes.length ?? 0))
  })

  it('says that heat or life is too much and what would do', () => {
    const hot = sizeSpring(makeRequest({ temperatureC: 400 }), catalogue)
    expect(hot.conflict?.requirements).toContain('temperatureC')
    expect(hot.conflict?.changes.find(c => c.path === 'temperatureC')?.to).toBe(250)
    const long = sizeSpring(makeRequest({ duty: { cycles: 1e7 }, fit: { boreMm: 9 } }), catalogue)
    expect(long.conflict?.requirements).toContain('duty.cycles')
    expect(long.conflict?.requirements).toContain('fit.boreMm')
    expect(long.conflict?.changes.find(c => c.path === 'duty.cycles')?.to).toBe(99_999)
  })

  it('blames the wire where there is none', () => {
    expect(sizeSpring(makeRequest(), []).conflict).toEqual({ requirements: ['materials'], changes: [] })
  })

  it('leaves the explanation out when told', () => {
    expect(sizeSpring(makeRequest({ temperatureC: 400 }), catalogue, { explainConflict: false }).conflict).toBeNull()
  })
})
