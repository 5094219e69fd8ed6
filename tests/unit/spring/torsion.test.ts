import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { EvaluateResponseSchema } from '#shared/schemas/spring'
import { MATERIAL_CODES, evaluateTorsion, type TorsionInput } from '#shared/spring'
import { TORSION_CHECKS } from '../../../shared/spring/mechanics/torsion/checks'

const LEGS = [{ lengthMm: 30, form: 'tangential' }, { lengthMm: 30, form: 'tangential' }] as const

/** A spring that passes every check: music-grade EN wire 2 mm on 16 mm, 5.25 coils in the body, turned to 300 and 800 N mm. */
const makeTorsion = (overrides: Partial<TorsionInput> = {}): TorsionInput => ({
  kind: 'torsion', material: 'EN10270-1-SH', wireDiameterMm: 2, meanDiameterMm: 16, bodyCoils: 5.25, legs: LEGS,
  points: [{ momentNmm: 300 }, { momentNmm: 800 }], ...overrides,
})
const stopsOf = (input: TorsionInput) => evaluateTorsion(input).checks.filter(c => !c.ok && c.severity === 'stop').map(c => c.code)
const verdict = (input: TorsionInput, code: string) => {
  const check = evaluateTorsion(input).checks.find(c => c.code === code)
  return check ? (check.ok ? 'pass' : check.severity) : 'absent'
}

// EN 10270-1 SH wire of 2 mm: Rm 1980 MPa by its formula, E 206 000 MPa. Legs count 60/(3 pi 16) turns (Shigley).
const RM = 1980
const LEG_COILS = 60 / (3 * Math.PI * 16)
// 64 * 180 / pi = 3667 of EN 13906-3 for each degree.
const RATE = (206_000 * 2 ** 4) / (((64 * 180) / Math.PI) * 16 * (5.25 + LEG_COILS))
const BODY_TURNS = (800 / RATE / 360) * (5.25 / (5.25 + LEG_COILS))

describe('evaluating a sound torsion spring', () => {
  const result = evaluateTorsion(makeTorsion())

  it('passes every check and answers in the agreed shape', () => {
    expect(result.checks.filter(c => !c.ok)).toEqual([])
    expect(EvaluateResponseSchema.parse(result)).toEqual(result)
  })

  it('has the rate, stress, legs and lengths of the formulas', () => {
    expect(result.tensileStrengthMpa).toBe(RM)
    expect(result.allowableStressMpa).toBeCloseTo(0.7 * RM, 9)
    expect(result.rateNmmPerDeg).toBeCloseTo(RATE, 9)
    expect(result.rateNmmPerTurn).toBeCloseTo(360 * RATE, 6)
    expect(result.legCoils).toBeCloseTo(LEG_COILS, 12)
    expect(result.legDeflectionDeg).toBeCloseTo((800 / RATE) * (LEG_COILS / (5.25 + LEG_COILS)), 9)
    expect(result.stressCorrectionFactor).toBeCloseTo(8.07 / 7.25, 12)
    expect(result.wireLengthMm).toBeCloseTo(Math.PI * 16 * 5.25 + 60, 9)
    // 6.165 d^2 g for each metre of steel wire.
    expect(result.massG / (6.165 * 4 * result.wireLengthMm / 1000)).toBeCloseTo(1, 3)
    const last = result.points[1]
    expect(last?.angleDeg).toBeCloseTo(800 / RATE, 9)
    expect(last?.bendingStressMpa).toBeCloseTo((32 * 800) / (Math.PI * 8), 9)
    expect(last?.correctedStressMpa).toBeCloseTo((8.07 / 7.25) * (last?.bendingStressMpa ?? 0), 9)
    expect(last?.innerDiameterAtPointMm).toBeCloseTo((16 * 5.25) / (5.25 + BODY_TURNS) - 2, 9)
    expect(last?.bodyLengthMm).toBeCloseTo(2 * (6.25 + BODY_TURNS), 9)
    expect(result.recommendedRodMm).toBeCloseTo(0.9 * (last?.innerDiameterAtPointMm ?? 0), 9)
    expect(result.greatestMomentNmm).toBeCloseTo((0.7 * RM * Math.PI * 8) / 32, 6)
  })

  it('takes points by angle or moment, and coils of the body or active, alike', () => {
    expect(evaluateTorsion(makeTorsion({ points: [{ angleDeg: 300 / RATE }, { angleDeg: 800 / RATE }] })).points[1]?.momentNmm).toBeCloseTo(800, 9)
    const byActive = evaluateTorsion(makeTorsion({ bodyCoils: undefined, activeCoils: 5.25 + LEG_COILS }))
    expect(byActive.bodyCoils).toBeCloseTo(5.25, 12)
    expect(byActive.rateNmmPerDeg).toBeCloseTo(RATE, 9)
  })

  it('allows for friction by the other method, with the inner-fibre factor against 0.78 of the strength', () => {
    const wahl = evaluateTorsion(makeTorsion({ method: 'wahl' }))
    expect(wahl.rateNmmPerDeg / RATE).toBeCloseTo((64 * 180) / Math.PI / 3888, 12)
    // Ki at C = 8: (256 - 8 - 1)/(32 * 7).
    expect(wahl.stressCorrectionFactor).toBeCloseTo(247 / 224, 12)
    expect(wahl.allowableStressMpa).toBeCloseTo(0.78 * RM, 9)
    expect(wahl.points[1]?.utilisation).toBeCloseTo(((247 / 224) * 32 * 800) / (Math.PI * 8) / (0.78 * RM), 9)
  })

  it('takes a rod as mandrel or as part of the fit', () => {
    const rod = (input: TorsionInput) => evaluateTorsion(input).checks.find(c => c.code === 'rod')
    expect(rod(makeTorsion({ mandrelMm: 12 }))).toEqual(rod(makeTorsion({ fit: { rodMm: 12 } })))
    expect(rod(makeTorsion())).toBeUndefined()
  })

  it('softens the rate at temperature and leaves the rate at 20 °C alone', () => {
    const warm = evaluateTorsion(makeTorsion({ temperatureC: 70 }))
    expect(warm.rateNmmPerDeg).toBe(result.rateNmmPerDeg)
    expect(warm.rateAtTemperatureNmmPerDeg).toBeCloseTo(RATE * (1 - 0.25e-3 * 50), 9)
  })

  it('says what it takes for granted: the constant of the rate, the stored work, coiling stress and straight legs', () => {
    const said = result.assumptions.join(' ')
    expect(said).toContain('3667')
    // Half of 800 N mm times the angle in radians.
    const joules = (0.5 * 0.8 * (800 / RATE) * Math.PI) / 180
    expect(said).toContain(`${joules.toFixed(3)} J`)
    expect(said).toContain('Stress left by coiling')
    expect(said).not.toContain('Straight legs')
    expect(evaluateTorsion(makeTorsion({ legs: [{ lengthMm: 30, form: 'straight' }] })).assumptions.join(' ')).toContain('Straight legs')
    expect(evaluateTorsion(makeTorsion({ method: 'wahl' })).assumptions.join(' ')).toContain('3888')
  })
})

/** For each check that can stop: a change that it refuses, and one beside it that passes. */
const EDGES: Record<string, readonly [Partial<TorsionInput>, Partial<TorsionInput>]> = {
  'wire-range': [{ wireDiameterMm: 20.1, meanDiameterMm: 160, points: [] }, { wireDiameterMm: 20, meanDiameterMm: 160, points: [] }],
  'index': [{ meanDiameterMm: 7.99 }, { meanDiameterMm: 8 }],
  'coils': [{ bodyCoils: 2.99 }, { bodyCoils: 3 }],
  'order': [{ points: [{ momentNmm: 500 }, { momentNmm: 499 }] }, { points: [{ momentNmm: 499 }, { momentNmm: 500 }] }],
  // 0.7 * 1980 * pi * 8/32 = 1088.5 N mm (EN 13906-3).
  'stress-working': [{ points: [{ momentNmm: 1089 }] }, { points: [{ momentNmm: 1088 }] }],
  // Zimmerli over 0.577 by Goodman: 584.7 MPa reversed; from zero 2/(1/584.7 + 1/1980)/(8.07/7.25) = 811.1 MPa, 637.0 N mm.
  'fatigue': [{ points: [{ momentNmm: 638 }], duty: { cycles: 1e5 } }, { points: [{ momentNmm: 636 }], duty: { cycles: 1e5 } }],
  // Outside 18 mm and 0.30 mm of EN 15800 grade 2.
  'bore': [{ fit: { boreMm: 18.29 } }, { fit: { boreMm: 18.31 } }],
  'rod': [{ fit: { rodMm: (16 * 5.25) / (5.25 + BODY_TURNS) - 2.29 } }, { fit: { rodMm: (16 * 5.25) / (5.25 + BODY_TURNS) - 2.31 } }],
  'free-length': [{ fit: { maxFreeLengthMm: 2 * (6.25 + BODY_TURNS) - 0.001 } }, { fit: { maxFreeLengthMm: 2 * (6.25 + BODY_TURNS) + 0.001 } }],
  'solid-length': [{ fit: { maxSolidLengthMm: 12.49 } }, { fit: { maxSolidLengthMm: 12.51 } }],
  'temperature': [{ temperatureC: 100.1 }, { temperatureC: 100 }],
}

describe('checks of a torsion spring', () => {
  it.each(Object.entries(EDGES))('%s stops a spring just beyond its limit, and nothing else does; the one beside it passes', (code, [beyond, within]) => {
    expect(stopsOf(makeTorsion(beyond))).toEqual([code])
    expect(stopsOf(makeTorsion(within))).toEqual([])
  })

  it('has such a pair for every check that can stop', () => {
    expect(Object.keys(EDGES).sort()).toEqual(TORSION_CHECKS.map(c => c.code).filter(c => c !== 'winding' && c !== 'surroundings' && c !== 'method').sort())
  })

  it('stops an index over 20, turning the wrong way, and opening to the last coil', () => {
    expect(stopsOf(makeTorsion({ meanDiameterMm: 40.01 }))).toEqual(['index'])
    expect(stopsOf(makeTorsion({ meanDiameterMm: 40 }))).toEqual([])
    expect(stopsOf(makeTorsion({ points: [{ angleDeg: -1 }, { angleDeg: 50 }] }))).toEqual(['order'])
    expect(stopsOf(makeTorsion({ loadOpens: true, points: [{ angleDeg: 360 * 6 }] }))).toContain('order')
  })

  it('cautions near each limit before it stops', () => {
    expect(verdict(makeTorsion({ meanDiameterMm: 9 }), 'index')).toBe('caution')
    expect(verdict(makeTorsion({ bodyCoils: 3.5 }), 'coils')).toBe('caution')
    expect(verdict(makeTorsion({ points: [{ momentNmm: 1000 }] }), 'stress-working')).toBe('caution')
    expect(verdict(makeTorsion({ points: [{ momentNmm: 600 }], duty: { cycles: 1e5 } }), 'fatigue')).toBe('caution')
    expect(verdict(makeTorsion({ fit: { boreMm: 18.6 } }), 'bore')).toBe('caution')
    expect(verdict(makeTorsion({ fit: { rodMm: 12.9 } }), 'rod')).toBe('caution')
    expect(verdict(makeTorsion({ temperatureC: 85 }), 'temperature')).toBe('caution')
  })

  it('allows a fifth less stress where the load opens the coil, cautions, and asks the bore for the opened diameter', () => {
    const opened = evaluateTorsion(makeTorsion({ loadOpens: true, fit: { boreMm: 18.5 } }))
    expect(opened.allowableStressMpa).toBeCloseTo(0.8 * 0.7 * RM, 9)
    expect(opened.points[1]?.innerDiameterAtPointMm).toBeCloseTo((16 * 5.25) / (5.25 - BODY_TURNS) - 2, 9)
    expect(verdict(makeTorsion({ loadOpens: true }), 'winding')).toBe('caution')
    expect(verdict(makeTorsion(), 'winding')).toBe('pass')
    expect(opened.checks.find(c => c.code === 'bore')?.value).toBeCloseTo((16 * 5.25) / (5.25 - BODY_TURNS) + 2.3, 9)
    expect(opened.checks.find(c => c.code === 'bore')?.severity).toBe('stop')
    expect(opened.points[1]?.bodyLengthMm).toBeCloseTo(12.5, 9)
  })

  it('says which way a coil of a hand is turned', () => {
    const words = (input: TorsionInput) => evaluateTorsion(input).checks.find(c => c.code === 'winding')?.message
    expect(words(makeTorsion({ hand: 'right' }))).toContain('turned clockwise')
    expect(words(makeTorsion({ hand: 'left' }))).toContain('turned anticlockwise')
    expect(words(makeTorsion({ hand: 'left', loadOpens: true }))).toContain('turned clockwise')
    expect(words(makeTorsion())).not.toContain('clockwise')
  })

  it('shows life by Goodman between two moments, and by the fractions of music wire only for such wire to 1e6 strokes', () => {
    const two = evaluateTorsion(makeTorsion({ duty: { cycles: 1e6 } })).fatigue
    const half = ((8.07 / 7.25) * 32) / (Math.PI * 8) / 2
    expect(two?.amplitudeMpa).toBeCloseTo(500 * half, 9)
    expect(two?.meanStressMpa).toBeCloseTo(1100 * half, 9)
    const reversed = 241 / (1 - 379 / (0.67 * RM)) / 0.577
    expect(two?.safetyFactor).toBeCloseTo(1 / ((500 * half) / reversed + (1100 * half) / RM), 9)
    expect(two?.lifeFractionSafetyFactor).toBeCloseTo((0.5 * RM) / (1600 * half), 9)
    expect(evaluateTorsion(makeTorsion({ duty: { cycles: 1e7 } })).fatigue?.lifeFractionSafetyFactor).toBeNull()
    expect(evaluateTorsion(makeTorsion({ material: 'EN10270-3-1.4310', duty: { cycles: 1e6 } })).fatigue?.lifeFractionSafetyFactor).toBeNull()
    const thick = makeTorsion({ wireDiameterMm: 11, meanDiameterMm: 88, points: [{ momentNmm: 1000 }], duty: { cycles: 1e6 } })
    expect(stopsOf(thick)).toEqual(['fatigue'])
    expect(evaluateTorsion(thick).checks.find(c => c.code === 'fatigue')?.message).toContain('10 mm')
  })

  it('gives tolerances of the diameters by grade, and a tenth of each moment', () => {
    const rows = evaluateTorsion(makeTorsion({ toleranceGrade: 1 })).tolerances
    expect(rows.find(r => r.quantity === 'meanDiameterMm')?.plusMinus).toBe(0.15)
    expect(rows.find(r => r.quantity === 'moment2Nmm')?.plusMinus).toBeCloseTo(80, 9)
  })
})

const bounded = (min: number, max: number) => fc.double({ min, max, noNaN: true })

describe('properties of torsion springs', () => {
  it('never throws, and answers in the agreed shape whatever the numbers', () => {
    const moderate = fc.oneof(bounded(0.01, 300), fc.constantFrom(0.01, 0.1, 1, 3, 20))
    const point = fc.oneof(bounded(-1e4, 1e5).map(angleDeg => ({ angleDeg })), bounded(-1e6, 1e8).map(momentNmm => ({ momentNmm })))
    const spring: fc.Arbitrary<TorsionInput> = fc.record({
      kind: fc.constant('torsion' as const), material: fc.constantFrom(...MATERIAL_CODES), wireDiameterMm: bounded(0.01, 100), meanDiameterMm: moderate, bodyCoils: moderate,
      method: fc.constantFrom('en13906' as const, 'wahl' as const), loadOpens: fc.boolean(), temperatureC: bounded(-273, 2000),
      legs: fc.array(fc.record({ lengthMm: bounded(0.01, 5000), form: fc.constantFrom('straight' as const, 'tangential' as const) }), { maxLength: 2 }),
      points: fc.array(point, { maxLength: 6 }), duty: fc.record({ cycles: bounded(1, 1e12) }), fit: fc.record({ boreMm: bounded(0.01, 5000), rodMm: bounded(0.01, 5000) }),
    })
    fc.assert(fc.property(spring, (input) => {
      const result = evaluateTorsion(input)
      expect(EvaluateResponseSchema.parse(result)).toEqual(result)
    }), { numRuns: 1500, seed: 21 })
    const opened = evaluateTorsion(makeTorsion({ legs: [], bodyCoils: 6, loadOpens: true, points: [{ angleDeg: 360 * 6 }] }))
    expect(EvaluateResponseSchema.parse(opened)).toEqual(opened)
  })

  it('has a rate that goes with d^4 and falls with D and coils', () => {
    fc.assert(fc.property(bounded(0.3, 5), bounded(5, 15), bounded(3, 40), bounded(1.05, 1.8), (d, w, n, s) => {
      // One strength and modulus: those of the table step with the diameter.
      const rate = (wire: number, D: number, coils: number) => evaluateTorsion({
        kind: 'torsion', material: 'EN10270-1-SH', wireDiameterMm: wire, meanDiameterMm: D, bodyCoils: coils, materialValues: { youngsModulusMpa: 206_000 },
      }).rateNmmPerDeg
      const base = rate(d, d * w, n)
      expect(rate(d * s, d * w, n) / base).toBeCloseTo(s ** 4, 8)
      expect(rate(d, d * w * s, n) / base).toBeCloseTo(1 / s, 10)
      expect(rate(d, d * w, n * s) / base).toBeCloseTo(1 / s, 10)
    }), { numRuns: 200, seed: 22 })
  })

  it('scales as dimensions say: lengths by s, moments and mass by s^3, angles and stresses not at all', () => {
    fc.assert(fc.property(bounded(0.5, 3), bounded(5, 15), bounded(3, 20), bounded(0.5, 3), fc.boolean(), (d, w, n, s, loadOpens) => {
      const at = (scale: number) => evaluateTorsion({
        kind: 'torsion', material: 'EN10270-1-SH', wireDiameterMm: d * scale, meanDiameterMm: d * w * scale, bodyCoils: n, loadOpens,
        legs: [{ lengthMm: 20 * scale, form: 'tangential' }, { lengthMm: 10 * scale, form: 'tangential' }], points: [{ angleDeg: 40 }],
        materialValues: { youngsModulusMpa: 206_000, tensileStrengthMpa: 1800, densityKgPerM3: 7850 },
      })
      const [small, large] = [at(1), at(s)]
      const ratio = (of: (e: typeof small) => number | null | undefined) => (of(large) ?? Number.NaN) / (of(small) ?? Number.NaN)
      expect(ratio(e => e.rateNmmPerDeg) / s ** 3).toBeCloseTo(1, 9)
      expect(ratio(e => e.points[0]?.momentNmm) / s ** 3).toBeCloseTo(1, 9)
      expect(ratio(e => e.massG) / s ** 3).toBeCloseTo(1, 9)
      expect(ratio(e => e.points[0]?.correctedStressMpa)).toBeCloseTo(1, 9)
      expect(ratio(e => e.points[0]?.innerDiameterAtPointMm) / s).toBeCloseTo(1, 9)
      expect(ratio(e => e.points[0]?.bodyLengthMm) / s).toBeCloseTo(1, 9)
      expect(ratio(e => e.legDeflectionDeg)).toBeCloseTo(1, 9)
      expect(ratio(e => e.greatestAngleDeg)).toBeCloseTo(1, 9)
    }), { numRuns: 200, seed: 23 })
  })
})
