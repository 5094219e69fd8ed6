import { describe, expect, it } from 'vitest'
import { EvaluateRequestSchema, SizeRequestSchema, SizeResponseSchema } from '#shared/schemas/spring'
import { sizeSpring } from '#shared/spring'
import { makeRequest, makeSpring, makeWires } from './springs'

const issues = (schema: typeof EvaluateRequestSchema | typeof SizeRequestSchema, body: unknown) =>
  (schema.safeParse(body).error?.issues ?? []).map(i => [i.path.join('.'), i.message])
const paths = (schema: typeof EvaluateRequestSchema | typeof SizeRequestSchema, body: unknown) => issues(schema, body).map(i => i[0])

describe('evaluate request', () => {
  it('accepts a spring and refuses what is missing, unknown, not a number or beyond physical bounds', () => {
    expect(EvaluateRequestSchema.safeParse(makeSpring()).success).toBe(true)
    expect(paths(EvaluateRequestSchema, { ...makeSpring(), colour: 'red' })).toEqual([''])
    expect(issues(EvaluateRequestSchema, { ...makeSpring(), wireDiameterMm: undefined })).toEqual([['wireDiameterMm', 'The wire diameter is missing.']])
    for (const bad of ['2', Number.NaN, Infinity, -1, 0, 1e9, null]) {
      expect(paths(EvaluateRequestSchema, { ...makeSpring(), wireDiameterMm: bad }), String(bad)).toContain('wireDiameterMm')
    }
    expect(paths(EvaluateRequestSchema, { ...makeSpring(), points: [{ lengthMm: 40, forceN: 3 }] })).toEqual(['points.0'])
    expect(paths(EvaluateRequestSchema, { ...makeSpring(), points: Array.from({ length: 7 }, () => ({ lengthMm: 40 })) })).toEqual(['points'])
    expect(paths(EvaluateRequestSchema, { ...makeSpring(), toleranceGrade: 4 })).toEqual(['toleranceGrade'])
  })

  it('names the kinds there are, and what each kind needs', () => {
    expect(issues(SizeRequestSchema, { ...makeRequest(), kind: 'leaf' })).toEqual([['kind', 'The kind must be compression, extension or torsion.']])
    const bare = { material: 'ASTM-A228', wireDiameterMm: 1, meanDiameterMm: 8 }
    expect(issues(EvaluateRequestSchema, { ...bare, kind: 'extension', initialTensionN: 2 })).toEqual([['bodyCoils', 'Give the coils in the body (bodyCoils) or the active coils (activeCoils).']])
    expect(issues(EvaluateRequestSchema, { ...bare, kind: 'extension', bodyCoils: 10 })).toEqual([['initialTensionN', 'The initial tension is missing.']])
    expect(issues(EvaluateRequestSchema, { ...bare, kind: 'torsion', bodyCoils: 10, activeCoils: 9 })).toEqual([['activeCoils', 'The active coils (9) cannot be fewer than those in the body (10).']])
    expect(issues(EvaluateRequestSchema, { ...bare, kind: 'torsion', bodyCoils: 10, mandrelMm: 5, fit: { rodMm: 6 } }).map(([path]) => path)).toEqual(['mandrelMm'])
    expect(issues(EvaluateRequestSchema, { ...bare, kind: 'torsion', bodyCoils: 10, points: [{ forceN: 5 }] })).toEqual([['points.0', 'Each point is one of: an angle from free (angleDeg) or a moment (momentNmm).']])
  })

  it('refuses fields that contradict each other, at the field', () => {
    expect(paths(EvaluateRequestSchema, makeSpring({ fit: { boreMm: 10, rodMm: 12 } }))).toEqual(['fit.boreMm'])
    expect(paths(EvaluateRequestSchema, makeSpring({ meanDiameterMm: 2 }))).toEqual(['meanDiameterMm'])
    expect(paths(EvaluateRequestSchema, makeSpring({ totalCoils: 7 }))).toEqual(['totalCoils'])
  })
})

describe('size request', () => {
  it('accepts the four forms and fills objective and limit', () => {
    const parsed = SizeRequestSchema.parse(makeRequest())
    expect(parsed.objective).toBe('price')
    expect(parsed.limit).toBe(5)
    const [point] = makeRequest().points
    expect(SizeRequestSchema.safeParse({ kind: 'compression', points: [point] }).success).toBe(true)
    expect(SizeRequestSchema.safeParse({ kind: 'compression', points: [point], rateNPerMm: 5 }).success).toBe(true)
    expect(SizeRequestSchema.safeParse({ kind: 'compression', points: [], rateNPerMm: 5, freeLengthMm: 50 }).success).toBe(true)
  })

  it('refuses what no spring can do, at the field', () => {
    const [a, b] = makeRequest().points
    expect(paths(SizeRequestSchema, makeRequest({ points: [] }))).toEqual(['points'])
    expect(paths(SizeRequestSchema, { kind: 'compression', points: [b, a] })).toEqual(['points.1.lengthMm', 'points.1.forceN'])
    expect(paths(SizeRequestSchema, makeRequest({ rateNPerMm: 5 }))).toEqual(['rateNPerMm'])
    expect(paths(SizeRequestSchema, makeRequest({ freeLengthMm: 50 }))).toEqual(['freeLengthMm'])
    expect(paths(SizeRequestSchema, { kind: 'compression', points: [a], freeLengthMm: 40 })).toEqual(['points.0.lengthMm'])
    expect(paths(SizeRequestSchema, makeRequest({ fit: { maxFreeLengthMm: 40 } }))).toEqual(['fit.maxFreeLengthMm'])
    expect(paths(SizeRequestSchema, makeRequest({ fit: { boreMm: 10, rodMm: 10 } }))).toEqual(['fit.boreMm'])
    expect(paths(SizeRequestSchema, { ...makeRequest(), materials: ['EN10270-1-SH'], wireDiametersMm: [2] })).toEqual(['objective'])
    expect(paths(SizeRequestSchema, { ...makeRequest(), limit: 21 })).toEqual(['limit'])
  })

  it('describes the answer of sizing, with and without a design', () => {
    for (const request of [makeRequest(), makeRequest({ temperatureC: 400 })]) {
      const result = sizeSpring(request, makeWires('EN10270-1-SH', 'EN10270-3-1.4310'))
      expect(SizeResponseSchema.safeParse(result).error).toBeUndefined()
    }
  })
})
