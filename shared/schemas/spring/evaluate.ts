import { z } from 'zod'
import { TOLERANCE_GRADES } from '../../spring/codes'
import type { CompressionEvaluation, CompressionInput } from '../../spring/mechanics/compression/types'
import {
  CoilHandSchema, CompressionKind, ForceN, FreeLengthMm, LengthMm, MaterialCodeSchema, MaterialValuesSchema, WireDiameterMm,
  compressionConditions, quantity,
} from './common'

const pointError = 'Each point is one of: a length (lengthMm), a force (forceN) or a deflection (deflectionMm).'

/** One working position, by length, force or deflection. */
export const EvaluatePointSchema = z.union(
  [
    z.strictObject({ lengthMm: LengthMm }),
    z.strictObject({ forceN: ForceN }),
    z.strictObject({ deflectionMm: quantity('The deflection', 'mm', { min: 0, max: 20_000 }) }),
  ],
  { error: pointError },
)

/** Body of `POST /api/v1/springs/evaluate`. */
export const EvaluateRequestSchema = z
  .strictObject({
    kind: CompressionKind,
    material: MaterialCodeSchema,
    wireDiameterMm: WireDiameterMm,
    meanDiameterMm: quantity('The mean diameter', 'mm', { min: 0.02, max: 5000 }),
    activeCoils: quantity('The number of active coils', '', { min: 0.1, max: 1000 }),
    totalCoils: quantity('The total number of coils', '', { min: 0.1, max: 1100 }).optional(),
    freeLengthMm: FreeLengthMm,
    points: z.array(EvaluatePointSchema).max(6, { error: 'At most 6 points.' }).optional(),
    materialValues: MaterialValuesSchema.optional(),
    hand: CoilHandSchema.optional(),
    ...compressionConditions,
  })
  .check((ctx) => {
    const { wireDiameterMm, meanDiameterMm, activeCoils, totalCoils } = ctx.value
    if (meanDiameterMm < 1.5 * wireDiameterMm) {
      ctx.issues.push({
        code: 'custom',
        path: ['meanDiameterMm'],
        input: meanDiameterMm,
        message: `A mean diameter of ${meanDiameterMm} mm is under one and a half times the wire (${wireDiameterMm} mm): no coil can be wound so tightly.`,
      })
    }
    if (totalCoils !== undefined && totalCoils < activeCoils) {
      ctx.issues.push({
        code: 'custom',
        path: ['totalCoils'],
        input: totalCoils,
        message: `The total number of coils (${totalCoils}) cannot be less than the active ones (${activeCoils}).`,
      })
    }
  }) satisfies z.ZodType<CompressionInput>

export type EvaluateRequest = z.infer<typeof EvaluateRequestSchema>

export const CheckSchema = z.object({
  code: z.string(),
  ok: z.boolean(),
  severity: z.enum(['stop', 'caution', 'note']),
  value: z.number().nullable(),
  limit: z.number().nullable(),
  message: z.string(),
})

export const ToleranceSchema = z.object({
  quantity: z.string(),
  nominal: z.number(),
  plusMinus: z.number(),
  grade: z.literal([...TOLERANCE_GRADES]),
  source: z.string(),
})

const number = z.number()

/** Answer of `POST /api/v1/springs/evaluate`. */
export const EvaluateResponseSchema = z.object({
  springIndex: number,
  stressCorrectionFactor: number,
  rateNPerMm: number,
  outerDiameterMm: number,
  innerDiameterMm: number,
  totalCoils: number,
  wireLengthMm: number,
  massG: number,
  tensileStrengthMpa: number.nullable(),
  allowableStressMpa: number.nullable(),
  points: z.array(z.object({
    lengthMm: number,
    deflectionMm: number,
    forceN: number,
    stressMpa: number,
    correctedStressMpa: number,
    utilisation: number.nullable(),
  })),
  checks: z.array(CheckSchema),
  tolerances: z.array(ToleranceSchema),
  assumptions: z.array(z.string()),
  solidLengthMm: number,
  solid: z.object({ forceN: number, stressMpa: number, correctedStressMpa: number }),
  minimumClearanceMm: number,
  shortestLengthMm: number,
  outerDiameterAtSolidMm: number,
  pitchMm: number,
  naturalFrequencyHz: number,
  buckling: z.object({ slenderness: number, criticalDeflectionMm: number.nullable(), ok: z.boolean() }),
  fatigue: z.object({
    method: z.string(),
    meanStressMpa: number,
    amplitudeMpa: number,
    allowableAmplitudeMpa: number,
    safetyFactor: number,
    life: number,
    lifeFractionSafetyFactor: number.nullable(),
  }).nullable(),
  rateAtTemperatureNPerMm: number.nullable(),
}) satisfies z.ZodType<CompressionEvaluation, unknown>

export type EvaluateResponse = z.infer<typeof EvaluateResponseSchema>
