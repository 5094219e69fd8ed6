import { describe, expect, it } from 'vitest'
import type { Problem } from '#shared/schemas/problem'
import {
  EvaluateResponseSchema, MaterialsResponseSchema, SizeResponseSchema, type EvaluateResponse, type MaterialsResponse, type SizeResponse,
} from '#shared/schemas/spring'
import { MATERIAL_CODES } from '#shared/spring/codes'
import { Visitor } from './support/visitor'

const visitor = new Visitor()
const evaluate = (body: object) => visitor.post<EvaluateResponse>('/api/v1/springs/evaluate', body)
const refused = async (body: object) => {
  const { status, headers, body: problem } = await visitor.post<Problem>('/api/v1/springs/evaluate', body)
  expect([status, headers.get('content-type')?.split(';')[0]]).toEqual([422, 'application/problem+json'])
  return (problem.errors ?? []).map(({ path }) => path)
}

const COMPRESSION = { kind: 'compression', material: 'EN10270-1-SH', wireDiameterMm: 2, meanDiameterMm: 16, activeCoils: 8, freeLengthMm: 60, points: [{ lengthMm: 50 }, { lengthMm: 40 }] }
const EXTENSION = { kind: 'extension', material: 'EN10270-1-SH', wireDiameterMm: 1.6, meanDiameterMm: 12, bodyCoils: 20, initialTensionN: 12, points: [{ lengthMm: 60 }, { lengthMm: 75 }] }
const TORSION = { kind: 'torsion', material: 'EN10270-1-SH', wireDiameterMm: 2, meanDiameterMm: 16, bodyCoils: 6, legs: [{ lengthMm: 24 * Math.PI, form: 'tangential' }], points: [{ angleDeg: 60 }] }

describe('evaluating a spring over HTTP', () => {
  it('gives a compression spring\'s rate, stresses and checks', async () => {
    const { status, body } = await evaluate(COMPRESSION)
    expect(status).toBe(200)
    if (body.kind !== 'compression') throw new Error(body.kind)
    // 81 500 * 2^4/(8 * 16^3 * 8)
    expect(body.rateNPerMm).toBeCloseTo(4.9744, 4)
    expect(body.points[1]?.stressMpa).toBeCloseTo((8 * 20 * 4.97437 * 16) / (8 * Math.PI), 2)
    expect(body.checks.map(({ code }) => code)).toEqual(expect.arrayContaining(['wire-range', 'index', 'coils', 'order', 'clearance', 'stress-solid', 'stress-working', 'buckling', 'tangling']))
    expect(body.checks.filter(({ ok, severity }) => !ok && severity === 'stop')).toEqual([])
    expect(EvaluateResponseSchema.parse(body)).toEqual(body)
  })

  it('gives an extension spring\'s hooks and initial tension', async () => {
    const { status, body } = await evaluate(EXTENSION)
    expect(status).toBe(200)
    if (body.kind !== 'extension') throw new Error(body.kind)
    // Two hooks work like G/E of a coil (Shigley).
    expect(body.rateNPerMm).toBeCloseTo((81_500 * 1.6 ** 4) / (8 * 12 ** 3 * (20 + 81_500 / 206_000)), 6)
    expect(body.initialStressMpa).toBeCloseTo((8 * 12 * 12) / (Math.PI * 1.6 ** 3), 6)
    expect(body.checks.map(({ code }) => code)).toEqual(expect.arrayContaining(['initial-tension', 'stress-hook-bending', 'stress-hook-torsion']))
    expect(EvaluateResponseSchema.parse(body)).toEqual(body)
  })

  it('gives a torsion spring\'s rate by degree and its shrinking bore', async () => {
    const { status, body } = await evaluate(TORSION)
    expect(status).toBe(200)
    if (body.kind !== 'torsion') throw new Error(body.kind)
    // The leg works like 24 pi/(3 pi 16) = half a turn.
    expect(body.legCoils).toBeCloseTo(0.5, 9)
    expect(body.rateNmmPerDeg).toBeCloseTo((206_000 * 2 ** 4) / (3666.93 * 16 * 6.5), 3)
    expect(body.points[0]?.innerDiameterAtPointMm).toBeLessThan(body.innerDiameterMm)
    expect(EvaluateResponseSchema.parse(body)).toEqual(body)
  })

  it('refuses each wrong value at its path', async () => {
    expect(await refused({ ...COMPRESSION, wireDiameterMm: '2' })).toEqual(['wireDiameterMm'])
    expect(await refused({ ...COMPRESSION, points: [{ lengthMm: 50, forceN: 3 }] })).toEqual(['points.0'])
    expect(await refused({ ...COMPRESSION, fit: { boreMm: 10, rodMm: 12 } })).toEqual(['fit.boreMm'])
    expect(await refused({ ...EXTENSION, bodyCoils: undefined })).toEqual(['bodyCoils'])
    expect(await refused({ ...EXTENSION, hook: { form: 'ring' } })).toEqual(['hook.form'])
    expect(await refused({ ...TORSION, legs: [{ lengthMm: -1, form: 'straight' }] })).toEqual(['legs.0.lengthMm'])
    expect(await refused({ ...TORSION, points: [{ forceN: 5 }] })).toEqual(['points.0'])
    expect(await refused({ ...TORSION, kind: 'leaf' })).toEqual(['kind'])
    expect(await refused({ ...COMPRESSION, colour: 'red' })).toHaveLength(1)
  })
})

const SIZES: readonly (readonly [string, object])[] = [
  ['compression', { kind: 'compression', points: [{ lengthMm: 50, forceN: 60 }, { lengthMm: 35, forceN: 150 }] }],
  ['extension', { kind: 'extension', points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 90, forceN: 60 }] }],
  ['torsion', { kind: 'torsion', points: [{ angleDeg: 90, momentNmm: 500 }], legs: [{ lengthMm: 30, form: 'tangential' }] }],
]

describe('a spring that was sized', () => {
  it.each(SIZES)('as %s can be sent back as it came and is evaluated the same', async (kind, request) => {
    const { status, body } = await visitor.post<SizeResponse>('/api/v1/springs/size', { ...request, materials: ['EN10270-1-SH'], wireDiametersMm: [1.6, 2, 2.5], objective: 'mass', limit: 2 })
    expect(status).toBe(200)
    expect(SizeResponseSchema.safeParse(body).error).toBeUndefined()
    expect(body.designs.length).toBeGreaterThan(0)
    for (const design of body.designs) {
      expect(design.kind).toBe(kind)
      const again = await evaluate(design.spring)
      expect(again.status).toBe(200)
      const stops = again.body.checks.filter(({ ok, severity }) => !ok && severity === 'stop')
      expect(stops).toEqual([])
      expect(again.body.massG).toBeCloseTo(design.evaluation.massG, 9)
      expect(again.body.checks.map(({ code }) => code)).toEqual(design.evaluation.checks.map(({ code }) => code))
    }
  })
})

describe('the materials', () => {
  it('are all told, each with its range, its sizes, and where every value comes from', async () => {
    const { status, body } = await visitor.get<MaterialsResponse>('/api/v1/materials')
    expect(status).toBe(200)
    expect(MaterialsResponseSchema.parse(body)).toEqual(body)
    expect(body.materials.map(({ code }) => code)).toEqual([...MATERIAL_CODES])
    for (const material of body.materials) {
      expect(material.standardWires.length, material.code).toBeGreaterThan(5)
      for (const { wireDiameterMm, tensileStrengthMpa } of material.standardWires) {
        expect(wireDiameterMm).toBeGreaterThanOrEqual(material.wireDiameterFromMm)
        expect(wireDiameterMm).toBeLessThanOrEqual(material.wireDiameterToMm)
        expect(tensileStrengthMpa).toBeGreaterThan(500)
      }
    }
    // Phosphor bronze by its band from 2 to 7.5 mm: 932/d^0.064 (from memory of Shigley, Table 10-4).
    const bronze = body.materials.find(({ code }) => code === 'ASTM-B159')
    expect(bronze?.standardWires.find(({ wireDiameterMm }) => wireDiameterMm === 3)?.tensileStrengthMpa).toBeCloseTo(932 / 3 ** 0.064, 6)
    expect(bronze?.strengthOrigin).toBe('from memory')
  })

  it('outside the range of their standard are refused with the range', async () => {
    const { body } = await evaluate({ ...COMPRESSION, material: 'ASTM-B159', wireDiameterMm: 8, meanDiameterMm: 64, freeLengthMm: 150, points: [] })
    const check = body.checks.find(({ code }) => code === 'wire-range')
    expect(check).toMatchObject({ ok: false, severity: 'stop', value: 8, limit: 7.5 })
    expect(check?.message).toContain('0.1 to 7.5 mm')
    expect(body.tensileStrengthMpa).toBeNull()
  })
})

it('is described with all three kinds in the OpenAPI document', async () => {
  const { body } = await visitor.get<{ components: { schemas: Record<string, { oneOf?: { properties: { kind: { const: string } } }[] }> } }>('/api/v1/openapi.json')
  for (const name of ['EvaluateRequest', 'EvaluateResponse', 'SizeRequest']) {
    expect(body.components.schemas[name]?.oneOf?.map(({ properties }) => properties.kind.const), name).toEqual(['compression', 'extension', 'torsion'])
  }
})
