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

/*
 * For each check that can stop: a change to the sound spring just beyond its limit, and one beside it that passes. The numbers follow from
 * 2 mm wire on 16 mm, rate 4.974 N/mm, 5.093 MPa a newton, solid at 20.21 mm, Rm 1980 MPa.
 */
const EDGES: Record<string, readonly [Partial<CompressionInput>, Partial<CompressionInput>]> = {
  'wire-range': [{ wireDiameterMm: 20.001, meanDiameterMm: 160, freeLengthMm: 430, points: [] }, { wireDiameterMm: 20, meanDiameterMm: 160, freeLengthMm: 430, points: [] }],
  'index': [{ meanDiameterMm: 7.99, freeLengthMm: 27, points: [] }, { meanDiameterMm: 8, freeLengthMm: 27, points: [] }],
  'coils': [{ activeCoils: 1.999, freeLengthMm: 14, points: [] }, { activeCoils: 2, freeLengthMm: 14, points: [] }],
  'order': [{ points: [{ lengthMm: 40 }, { lengthMm: 40.01 }] }, { points: [{ lengthMm: 40.01 }, { lengthMm: 40 }] }],
  // 20.21 + 8 (0.0015 16^2/2 + 0.1 2) = 23.346 mm.
  'clearance': [{ points: [{ lengthMm: 23.34 }] }, { points: [{ lengthMm: 23.35 }] }],
  // 0.56 * 1980 = 1108.8 MPa, 43.77 mm of travel.
  'stress-solid': [{ freeLengthMm: 64, points: [] }, { freeLengthMm: 63.97, points: [] }],
  'stress-working': [{ freeLengthMm: 80, points: [{ lengthMm: 36.22 }], solidSafe: false }, { freeLengthMm: 80, points: [{ lengthMm: 36.24 }], solidSafe: false }],
  // Goodman through Zimmerli: Ssu 1326.6, Se 337.4 MPa; from 148.5 MPa at 55 mm to 626 MPa, corrected by 1.1724.
  'fatigue': [{ duty: { cycles: 1e6 }, points: [{ lengthMm: 55 }, { lengthMm: 38.9 }] }, { duty: { cycles: 1e6 }, points: [{ lengthMm: 55 }, { lengthMm: 38.94 }] }],
  // 18 + 0.251 of growth + 0.3 of EN 15800 grade 2.
  'bore': [{ fit: { boreMm: 18.55 } }, { fit: { boreMm: 18.56 } }],
  'rod': [{ fit: { rodMm: 13.71 } }, { fit: { rodMm: 13.69 } }],
  // EN 13906-1 for L0/D 3.75, seating 2: 3.031 mm.
  'buckling': [{ seatingCoefficient: 2, points: [{ deflectionMm: 3.04 }] }, { seatingCoefficient: 2, points: [{ deflectionMm: 3.03 }] }],
  'solid-length': [{ fit: { maxSolidLengthMm: 20.2 } }, { fit: { maxSolidLengthMm: 20.22 } }],
  'free-length': [{ fit: { maxFreeLengthMm: 59.99 } }, { fit: { maxFreeLengthMm: 60 } }],
  'temperature': [{ temperatureC: 100.1 }, { temperatureC: 100 }],
}

describe('checks', () => {
  it.each(Object.entries(EDGES))('%s stops a spring just beyond its limit, and nothing else does; the one beside it passes', (code, [beyond, within]) => {
    expect(stopsOf(makeSpring(beyond))).toEqual([code])
    expect(stopsOf(makeSpring(within))).toEqual([])
  })

  it('has such a pair for every check that can stop', () => {
    const neverStop = ['resonance', 'impact', 'peening', 'tangling', 'surroundings', 'method']
    expect(Object.keys(EDGES).sort()).toEqual(COMPRESSION_CHECKS.map(c => c.code).filter(c => !neverStop.includes(c)).sort())
  })

  it('names what each rests on, whatever the verdict', () => {
    // A standard, a book, practice, what was asked for, or the plain geometry of a spring between free and solid.
    const basis = /EN \d|DIN|ASTM|Shigley|Zimmerli|common practice|asked for|from memory|table|free and the solid|Plain|Surroundings/
    for (const change of [{}, ...Object.values(EDGES).flat()]) {
      for (const { code, message } of evaluateCompression(makeSpring({ shotPeened: true, ...change }), { surroundings: 'damp' }).checks) {
        if (code === 'order') continue
        expect(message, code).toMatch(basis)
        expect(message).toMatch(/^[A-Z0-9-].*\.$/)
      }
    }
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

  it('shows no life where the data end: copper alloys, wire over 10 mm, a spring drawn out; nor fractions for wire they are not published for', () => {
    const worked = { duty: { cycles: 1e6 }, points: [{ lengthMm: 55 }, { lengthMm: 45 }] } as const
    expect(evaluateCompression(makeSpring({ ...worked, material: 'ASTM-B159' })).fatigue).toBeNull()
    expect(stopsOf(makeSpring({ ...worked, material: 'ASTM-B159' }))).toContain('fatigue')
    expect(evaluateCompression(makeSpring({ ...worked, wireDiameterMm: 10.5, meanDiameterMm: 84, freeLengthMm: 240, points: [{ lengthMm: 230 }, { lengthMm: 225 }] })).fatigue).toBeNull()
    expect(evaluateCompression(makeSpring({ ...worked, points: [{ lengthMm: 65 }, { lengthMm: 60 }] })).fatigue).toBeNull()
    const fraction = (material: CompressionInput['material']) => evaluateCompression(makeSpring({ ...worked, material })).fatigue?.lifeFractionSafetyFactor
    expect(fraction('EN10270-1-SH')).toBeGreaterThan(1)
    expect(fraction('EN10270-3-1.4310')).toBeGreaterThan(1)
    expect(fraction('EN10270-2-FDSiCr')).toBeNull()
    const long = evaluateCompression(makeSpring({ ...worked, duty: { cycles: 1e9 } })).checks.find(c => c.code === 'fatigue')?.message
    expect(long).toContain('at 1.00e+7 strokes, the longest life published')
  })

  it('cautions of relaxation where it is warm and much stressed, not where it is only one of them', () => {
    const pressed = { freeLengthMm: 63.9, points: [{ lengthMm: 27 }] } as const
    expect(verdict(makeSpring({ ...pressed, temperatureC: 65 }), 'temperature')).toBe('caution')
    expect(verdict(makeSpring({ ...pressed, temperatureC: 59 }), 'temperature')).toBe('pass')
    expect(verdict(makeSpring({ temperatureC: 65 }), 'temperature')).toBe('pass')
    expect(verdict(makeSpring({ ...pressed, points: [], temperatureC: 65 }), 'temperature')).toBe('pass')
  })

  it('adds the stress of quick strokes: 35.8 MPa for each metre a second in steel (v sqrt(2 rho G))', () => {
    expect(evaluateCompression(makeSpring()).impact).toBeNull()
    expect(evaluateCompression(makeSpring({ duty: { strokesPerMinute: 60 }, points: [] })).impact).toBeNull()
    // 10 mm to and fro 3000 times a minute: pi * 50 * 0.01 = 1.571 m/s.
    const { impact } = evaluateCompression(makeSpring({ duty: { strokesPerMinute: 3000 } }))
    expect(impact?.speedMPerS).toBeCloseTo(1.5708, 4)
    expect(impact?.stressMpa).toBeCloseTo(1.5708 * 35.77, 1)
    const near = { freeLengthMm: 63.9, points: [{ lengthMm: 45 }, { lengthMm: 24 }] } as const
    expect(verdict(makeSpring({ ...near, duty: { strokesPerMinute: 60 } }), 'impact')).toBe('pass')
    expect(verdict(makeSpring({ ...near, duty: { strokesPerMinute: 3000 } }), 'impact')).toBe('caution')
  })

  it('says why the stress at solid counts under changing load, and cautions of peening that shot cannot do', () => {
    const solid = (change: Partial<CompressionInput>) => evaluateCompression(makeSpring({ freeLengthMm: 66, points: [], solidSafe: false, ...change })).checks.find(c => c.code === 'stress-solid')?.message
    expect(solid({ duty: { cycles: 1e6 } })).toContain('surge may close the coils')
    expect(solid({})).not.toContain('surge')
    const thin = { wireDiameterMm: 0.8, meanDiameterMm: 6.4, freeLengthMm: 22, points: [{ lengthMm: 20 }, { lengthMm: 15 }], shotPeened: true } as const
    expect(verdict(makeSpring({ ...thin, duty: { cycles: 1e5 } }), 'peening')).toBe('caution')
    expect(verdict(makeSpring(thin), 'peening')).toBe('note')
  })

  it('cautions where EN limits are used with inch-system or copper wire, unless its strength is given', () => {
    const at = (change: Partial<CompressionInput>) => verdict(makeSpring(change), 'method')
    expect(at({})).toBe('absent')
    expect(at({ material: 'ASTM-A228' })).toBe('caution')
    expect(at({ material: 'ASTM-A228', method: 'wahl' })).toBe('absent')
    expect(at({ material: 'ASTM-A228', materialValues: { tensileStrengthMpa: 1900 } })).toBe('absent')
    expect(at({ material: 'ASTM-B197', materialValues: { tensileStrengthMpa: 1200 } })).toBe('caution')
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
