import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluateCompression, evaluateExtension, evaluateTorsion, type CompressionInput, type ExtensionInput, type TorsionInput } from '#shared/spring'
import { fromSi, toSi, type Quantity } from '#shared/units/convert'

/*
 * The formulas know no units: a spring evaluated in millimetres and newtons and then told in inches and pounds is the same as one
 * evaluated in inches and pounds from the start. By the textbook method, since EN 13906-1 adds a tolerance in millimetres to the solid
 * length, and with the values of the material given, since its tables go by millimetres.
 */
const inch = (value: number, quantity: Quantity) => fromSi(value, quantity, 'inch')
/** Pounds on a square inch; the display is in thousands of them. */
const psi = (mpa: number) => 1000 * inch(mpa, 'stress')
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true, noDefaultInfinity: true })
const coil = { d: between(0.5, 10), w: between(4.5, 18), n: between(3, 25), travel: between(0.05, 0.9), strengthMpa: between(800, 2400), G: between(40_000, 85_000), ratio: between(0.35, 0.42) }
const same = (told: number | null, evaluated: number | null) => expect(told! / evaluated!).toBeCloseTo(1, 10)

const values = (strengthMpa: number, G: number, ratio: number, as: (mpa: number) => number) =>
  ({ tensileStrengthMpa: as(strengthMpa), shearModulusMpa: as(G), youngsModulusMpa: as(G / ratio) })

describe('units commute with evaluating', () => {
  it('a compression spring', () => {
    fc.assert(fc.property(fc.record(coil), ({ d, w, n, travel, strengthMpa, G, ratio }) => {
      const make = (length: (mm: number) => number, stress: (mpa: number) => number): CompressionInput => ({
        kind: 'compression', method: 'wahl', material: 'ASTM-A228', wireDiameterMm: length(d), meanDiameterMm: length(d * w), activeCoils: n, freeLengthMm: length(2.2 * (n + 2) * d),
        points: [{ deflectionMm: length(travel * (n + 2) * d) }], seatingCoefficient: 1, materialValues: values(strengthMpa, G, ratio, stress),
      })
      const si = evaluateCompression(make(mm => mm, mpa => mpa))
      const us = evaluateCompression(make(mm => inch(mm, 'length'), psi))
      same(inch(si.rateNPerMm, 'rate'), us.rateNPerMm)
      same(inch(si.points[0]!.forceN, 'force'), us.points[0]!.forceN)
      same(psi(si.points[0]!.correctedStressMpa), us.points[0]!.correctedStressMpa)
      same(si.points[0]!.utilisation, us.points[0]!.utilisation)
      same(psi(si.solid.stressMpa), us.solid.stressMpa)
      for (const field of ['solidLengthMm', 'minimumClearanceMm', 'outerDiameterAtSolidMm', 'pitchMm', 'wireLengthMm'] as const) same(inch(si[field], 'length'), us[field])
      if (si.buckling.criticalDeflectionMm === null) expect(us.buckling.criticalDeflectionMm).toBeNull()
      else same(inch(si.buckling.criticalDeflectionMm, 'length'), us.buckling.criticalDeflectionMm)
    }), { numRuns: 300 })
  })

  it('an extension spring', () => {
    fc.assert(fc.property(fc.record(coil), ({ d, w, n, travel, strengthMpa, G, ratio }) => {
      const make = (length: (mm: number) => number, force: (n: number) => number, stress: (mpa: number) => number): ExtensionInput => ({
        kind: 'extension', method: 'wahl', material: 'ASTM-A228', wireDiameterMm: length(d), meanDiameterMm: length(d * w), bodyCoils: n, initialTensionN: force(5 * d * d),
        points: [{ forceN: force(5 * d * d * (1 + travel)) }], materialValues: values(strengthMpa, G, ratio, stress),
      })
      const si = evaluateExtension(make(mm => mm, force => force, mpa => mpa))
      const us = evaluateExtension(make(mm => inch(mm, 'length'), force => inch(force, 'force'), psi))
      same(inch(si.rateNPerMm, 'rate'), us.rateNPerMm)
      same(inch(si.points[0]!.lengthMm, 'length'), us.points[0]!.lengthMm)
      same(psi(si.points[0]!.stressMpa), us.points[0]!.stressMpa)
      same(psi(si.hookBendingStressMpa!), us.hookBendingStressMpa)
      same(psi(si.hookTorsionStressMpa!), us.hookTorsionStressMpa)
      same(inch(si.greatestForceN!, 'force'), us.greatestForceN)
      same(si.coilsEquivalent, us.coilsEquivalent)
    }), { numRuns: 300 })
  })

  it('a torsion spring', () => {
    fc.assert(fc.property(fc.record(coil), ({ d, w, n, travel, strengthMpa, G, ratio }) => {
      const make = (length: (mm: number) => number, stress: (mpa: number) => number): TorsionInput => ({
        kind: 'torsion', method: 'wahl', material: 'ASTM-A228', wireDiameterMm: length(d), meanDiameterMm: length(d * w), bodyCoils: n, legs: [{ lengthMm: length(4 * d * w), form: 'tangential' }],
        points: [{ angleDeg: 200 * travel }], materialValues: values(strengthMpa, G, ratio, stress),
      })
      const si = evaluateTorsion(make(mm => mm, mpa => mpa))
      const us = evaluateTorsion(make(mm => inch(mm, 'length'), psi))
      same(inch(si.rateNmmPerDeg, 'momentRate'), us.rateNmmPerDeg)
      same(inch(si.points[0]!.momentNmm, 'moment'), us.points[0]!.momentNmm)
      same(psi(si.points[0]!.bendingStressMpa), us.points[0]!.bendingStressMpa)
      same(inch(si.points[0]!.innerDiameterAtPointMm, 'length'), us.points[0]!.innerDiameterAtPointMm)
      same(si.legCoils, us.legCoils)
      same(inch(si.greatestMomentNmm!, 'moment'), us.greatestMomentNmm)
    }), { numRuns: 300 })
  })

  it('a value typed in inches is the one that comes back', () => {
    const quantities: readonly Quantity[] = ['length', 'force', 'rate', 'moment', 'momentRate', 'angle', 'stress', 'mass', 'temperature']
    fc.assert(fc.property(fc.constantFrom(...quantities), between(0.001, 1e6), (quantity, value) => {
      expect(fromSi(toSi(value, quantity, 'inch'), quantity, 'inch') / value).toBeCloseTo(1, 9)
    }))
  })
})
