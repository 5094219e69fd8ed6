import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { EvaluateRequestSchema, EvaluateResponseSchema } from '#shared/schemas/spring'
import { COMPRESSION_ENDS, MATERIAL_CODES, evaluateCompression, type CompressionInput } from '#shared/spring'
import { COMPRESSION_CHECKS } from '../../../shared/spring/mechanics/compression/checks'
import { makeSpring } from './springs'

const stopsOf = (input: CompressionInput) =>
  evaluateCompression(input).checks.filter(c => !c.ok && c.severity === 'stop').map(c => c.code)
const verdict = (input: CompressionInput, code: string) => {
  const check = evaluateCompression(input).checks.find(c => c.code === code)
  return check ? (check.ok ? 'pass' : check.severity) : 'absent'
}

describe('evaluating a sound spring', () => {
  const result = evaluateCompression(makeSpring())

  it('passes every check and answers in the agreed shape', () => {
    expect(result.checks.filter(c => !c.ok && c.severity !== 'note')).toEqual([])
    expect(EvaluateResponseSchema.parse(result)).toEqual(result)
  })

  it('computes the parts of the answer from each other', () => {
    expect(result.springIndex).toBe(8)
    expect(result.outerDiameterMm).toBe(18)
    expect(result.innerDiameterMm).toBe(14)
    expect(result.tensileStrengthMpa).toBe(1980)
    expect(result.allowableStressMpa).toBeCloseTo(0.56 * 1980, 9)
    expect(result.solidLengthMm).toBeCloseTo(10 * 2.021, 9)
    expect(result.shortestLengthMm).toBeCloseTo(result.solidLengthMm + result.minimumClearanceMm, 12)
    expect(result.solid.forceN).toBeCloseTo(result.rateNPerMm * (60 - result.solidLengthMm), 9)
    expect(result.points.map(p => p.forceN)).toEqual([10, 20].map(s => expect.closeTo(s * result.rateNPerMm, 9)))
    expect(result.fatigue).toBeNull()
    expect(result.tolerances.map(t => t.quantity)).toContain('force2N')
  })

  it('takes points by length, force or deflection alike', () => {
    const byLength = evaluateCompression(makeSpring({ points: [{ lengthMm: 45 }] })).points[0]
    const byDeflection = evaluateCompression(makeSpring({ points: [{ deflectionMm: 15 }] })).points[0]
    const byForce = evaluateCompression(makeSpring({ points: [{ forceN: 15 * result.rateNPerMm }] })).points[0]
    expect(byDeflection).toEqual(byLength)
    expect(byForce?.lengthMm).toBeCloseTo(45, 9)
  })

  it('replaces the table\'s values by the caller\'s', () => {
    const own = evaluateCompression(makeSpring({ materialValues: { tensileStrengthMpa: 1000, shearModulusMpa: 40_750, densityKgPerM3: 15_700 } }))
    expect(own.rateNPerMm).toBeCloseTo(result.rateNPerMm / 2, 12)
    expect(own.massG).toBeCloseTo(result.massG * 2, 9)
    expect(own.allowableStressMpa).toBeCloseTo(560, 9)
  })

  it('reports the textbook solid length and the Wahl factor by the other method', () => {
    const wahl = evaluateCompression(makeSpring({ method: 'wahl' }))
    expect(wahl.solidLengthMm).toBe(20)
    expect(wahl.stressCorrectionFactor).toBeCloseTo(31 / 28 + 0.615 / 8, 12)
    expect(wahl.allowableStressMpa).toBeCloseTo(0.45 * 1980, 9)
  })

  it('softens the rate at temperature and leaves the rate at 20 °C alone', () => {
    const warm = evaluateCompression(makeSpring({ temperatureC: 70 }))
    expect(warm.rateNPerMm).toBe(result.rateNPerMm)
    expect(warm.rateAtTemperatureNPerMm).toBeCloseTo(result.rateNPerMm * (1 - 0.25e-3 * 50), 9)
  })
})

/** One change to the sound spring that each stop check must refuse. */
const BROKEN: Record<string, Partial<CompressionInput>> = {
  'wire-range': { wireDiameterMm: 25, meanDiameterMm: 200, freeLengthMm: 600, points: [] },
  'index': { meanDiameterMm: 7.9, freeLengthMm: 27, points: [] },
  'coils': { activeCoils: 1.9, freeLengthMm: 14, points: [] },
  'order': { points: [{ lengthMm: 40 }, { lengthMm: 50 }] },
  'clearance': { points: [{ lengthMm: 22 }] },
  'stress-solid': { freeLengthMm: 66, points: [] },
  'stress-working': { freeLengthMm: 80, points: [{ lengthMm: 30 }], solidSafe: false },
  'fatigue': { duty: { cycles: 1e6 }, points: [{ lengthMm: 55 }, { lengthMm: 28 }] },
  'bore': { fit: { boreMm: 18.4 } },
  'rod': { fit: { rodMm: 13.8 } },
  'buckling': { seatingCoefficient: 2, points: [{ lengthMm: 35 }] },
  'solid-length': { fit: { maxSolidLengthMm: 20 } },
  'free-length': { fit: { maxFreeLengthMm: 59 } },
  'temperature': { temperatureC: 101 },
}

describe('checks', () => {
  it.each(Object.entries(BROKEN))('%s stops a spring that breaks it, and nothing else does', (code, change) => {
    expect(stopsOf(makeSpring(change))).toEqual([code])
  })

  it('has a broken spring for every check that can stop', () => {
    const neverStop = ['resonance', 'peening', 'tangling', 'surroundings']
    expect(Object.keys(BROKEN).sort()).toEqual(COMPRESSION_CHECKS.map(c => c.code).filter(c => !neverStop.includes(c)).sort())
  })

  it('stops points beyond the free length or below solid, and a free length without travel', () => {
    expect(stopsOf(makeSpring({ points: [{ lengthMm: 61 }] }))).toContain('order')
    expect(stopsOf(makeSpring({ points: [{ lengthMm: 61 }, { lengthMm: 40 }] }))).toContain('order')
    expect(stopsOf(makeSpring({ points: [{ lengthMm: 19 }] }))).toContain('order')
    expect(stopsOf(makeSpring({ freeLengthMm: 20, points: [] }))).toContain('order')
  })

  it('cautions near each limit before it stops', () => {
    expect(verdict(makeSpring({ meanDiameterMm: 9, freeLengthMm: 24, points: [] }), 'index')).toBe('caution')
    expect(verdict(makeSpring({ activeCoils: 2.5, freeLengthMm: 14, points: [] }), 'coils')).toBe('caution')
    expect(verdict(makeSpring({ points: [{ lengthMm: 23.9 }] }), 'clearance')).toBe('caution')
    expect(verdict(makeSpring({ freeLengthMm: 63.5, points: [] }), 'stress-solid')).toBe('caution')
    expect(verdict(makeSpring({ fit: { boreMm: 18.6 } }), 'bore')).toBe('caution')
    expect(verdict(makeSpring({ fit: { rodMm: 13.6 } }), 'rod')).toBe('caution')
    expect(verdict(makeSpring({ temperatureC: 85 }), 'temperature')).toBe('caution')
    expect(verdict(makeSpring({ temperatureC: -5 }), 'temperature')).toBe('caution')
    expect(verdict(makeSpring({ duty: { strokesPerMinute: 2000 } }), 'resonance')).toBe('caution')
    expect(evaluateCompression(makeSpring(), { stocked: false }).checks[0]).toMatchObject({ code: 'wire-range', ok: false, severity: 'caution' })
  })

  it('only cautions about solid stress where going solid is excluded, and about buckling where it is guided', () => {
    expect(verdict(makeSpring({ freeLengthMm: 66, points: [], solidSafe: false }), 'stress-solid')).toBe('caution')
    const tall = { seatingCoefficient: 2, points: [{ lengthMm: 35 }] } as const
    expect(verdict(makeSpring({ ...tall, guided: true }), 'buckling')).toBe('caution')
    expect(verdict(makeSpring({ ...tall, fit: { boreMm: 25 } }), 'buckling')).toBe('caution')
  })

  it('checks fatigue from 1e5 strokes, from zero where one point is given, and not in wire beyond the data', () => {
    const points = [{ lengthMm: 55 }, { lengthMm: 40 }]
    expect(verdict(makeSpring({ points, duty: { cycles: 99_999 } }), 'fatigue')).toBe('absent')
    const two = evaluateCompression(makeSpring({ points, duty: { cycles: 1e5 } }))
    const one = evaluateCompression(makeSpring({ points: points.slice(1), duty: { cycles: 1e5 } }))
    const factor = (r: typeof two) => r.checks.find(c => c.code === 'fatigue')?.value ?? Number.NaN
    expect(factor(two)).toBeGreaterThan(factor(one))
    expect(factor(two)).toBeCloseTo(two.fatigue?.safetyFactor ?? Number.NaN, 12)
    expect(factor(evaluateCompression(makeSpring({ points, duty: { cycles: 1e5 }, shotPeened: true })))).toBeGreaterThan(factor(two))
    const thick = makeSpring({ wireDiameterMm: 12, meanDiameterMm: 96, freeLengthMm: 240, points: [{ lengthMm: 230 }, { lengthMm: 225 }], duty: { cycles: 1e6 } })
    expect(stopsOf(thick)).toEqual(['fatigue'])
  })

  it('counts surroundings against plain steel and not against stainless', () => {
    const at = (material: CompressionInput['material']) =>
      evaluateCompression(makeSpring({ material }), { surroundings: 'damp' }).checks.find(c => c.code === 'surroundings')?.ok
    expect(at('EN10270-1-SH')).toBe(false)
    expect(at('EN10270-3-1.4310')).toBe(true)
  })
})

describe('any request the schema lets in', () => {
  const bounded = (min: number, max: number) => fc.double({ min, max, noNaN: true })
  const request = fc.record({
    kind: fc.constant('compression'),
    material: fc.constantFrom(...MATERIAL_CODES),
    wireDiameterMm: fc.oneof(bounded(0.01, 100), bounded(0.5, 5)),
    meanDiameterMm: fc.oneof(bounded(0.02, 5000), bounded(2, 60)),
    activeCoils: fc.oneof(bounded(0.1, 1000), bounded(2, 20)),
    freeLengthMm: fc.oneof(bounded(0.01, 20_000), bounded(10, 200)),
    ends: fc.constantFrom(...COMPRESSION_ENDS),
    points: fc.array(fc.oneof(
      fc.record({ lengthMm: bounded(0.01, 20_000) }), fc.record({ forceN: bounded(0.0001, 1e7) }), fc.record({ deflectionMm: bounded(0, 20_000) }),
    ), { maxLength: 6 }),
    method: fc.constantFrom('en13906', 'wahl'),
    duty: fc.record({ cycles: fc.oneof(bounded(0, 1e12), bounded(1e5, 1e8)), strokesPerMinute: bounded(0, 1e5) }),
    temperatureC: bounded(-273, 1500),
    fit: fc.record({ boreMm: bounded(20, 5000), rodMm: bounded(0.01, 19) }),
    shotPeened: fc.boolean(),
    preset: fc.boolean(),
    toleranceGrade: fc.constantFrom(1, 2, 3),
  })

  it('gets an answer of finite numbers in the agreed shape', () => {
    let parsed = 0
    fc.assert(fc.property(request, (body) => {
      const input = EvaluateRequestSchema.safeParse(body)
      if (!input.success || input.data.kind !== 'compression') return
      parsed++
      const result = evaluateCompression(input.data)
      expect(EvaluateResponseSchema.safeParse(result).error).toBeUndefined()
      expect(result.checks.every(c => c.message !== '')).toBe(true)
    }), { numRuns: 1000 })
    expect(parsed).toBeGreaterThan(300)
  })

  it('has stresses and index that do not change when every length grows alike and forces by its square', () => {
    // Wahl method: its solid length has no rounded wire tolerance, so the spring scales exactly. Strength is given.
    fc.assert(fc.property(bounded(0.6, 3), bounded(5, 12), bounded(3, 12), bounded(1.1, 3), (d, w, n, f) => {
      const spring = (scale: number) => evaluateCompression(makeSpring({
        method: 'wahl',
        wireDiameterMm: d * scale,
        meanDiameterMm: d * w * scale,
        activeCoils: n,
        freeLengthMm: 4 * n * d * scale,
        points: [{ lengthMm: 3 * n * d * scale }],
        materialValues: { tensileStrengthMpa: 1800 },
      }))
      const small = spring(1)
      const large = spring(f)
      expect(large.springIndex).toBeCloseTo(small.springIndex, 9)
      expect(large.points[0]?.stressMpa).toBeCloseTo(small.points[0]?.stressMpa ?? Number.NaN, 5)
      expect((large.points[0]?.forceN ?? 0) / (small.points[0]?.forceN ?? 1)).toBeCloseTo(f * f, 6)
      expect(large.massG / small.massG).toBeCloseTo(f ** 3, 6)
      expect(large.naturalFrequencyHz * f).toBeCloseTo(small.naturalFrequencyHz, 4)
      expect(large.solid.stressMpa).toBeCloseTo(small.solid.stressMpa, 4)
    }), { numRuns: 200 })
  })
})
