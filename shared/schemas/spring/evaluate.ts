import { z } from 'zod'
import { TOLERANCE_GRADES } from '../../spring/codes'
import type { CompressionInput } from '../../spring/mechanics/compression/types'
import type { ExtensionInput } from '../../spring/mechanics/extension/types'
import type { SpringEvaluation } from '../../spring/mechanics/spring'
import type { TorsionInput } from '../../spring/mechanics/torsion/types'
import {
  AngleDeg, CoilHandSchema, ForceN, FreeLengthMm, LengthMm, MaterialCodeSchema, MaterialValuesSchema, MomentNmm, WireDiameterMm, compressionConditions,
  extensionConditions, quantity, torsionConditions,
} from './common'

/** One working position, by length, force or deflection. */
export const EvaluatePointSchema = z.union(
  [
    z.strictObject({ lengthMm: LengthMm }),
    z.strictObject({ forceN: ForceN }),
    z.strictObject({ deflectionMm: quantity('The deflection', 'mm', { min: 0, max: 20_000 }) }),
  ],
  { error: 'Each point is one of: a length (lengthMm), a force (forceN) or a deflection (deflectionMm).' },
)

/** One working position of a torsion spring, by angle or moment. */
export const EvaluateTorsionPointSchema = z.union(
  [z.strictObject({ angleDeg: AngleDeg }), z.strictObject({ momentNmm: MomentNmm })],
  { error: 'Each point is one of: an angle from free (angleDeg) or a moment (momentNmm).' },
)

const MeanDiameterMm = quantity('The mean diameter', 'mm', { min: 0.02, max: 5000 })
const ActiveCoils = quantity('The number of active coils', '', { min: 0.1, max: 100_000 })
const BodyCoils = quantity('The number of coils in the body', '', { min: 0.1, max: 100_000 })
const MOST_POINTS = { error: 'At most 6 points.' }

/** What describes any spring outright. */
const wound = {
  material: MaterialCodeSchema,
  wireDiameterMm: WireDiameterMm,
  meanDiameterMm: MeanDiameterMm,
  materialValues: MaterialValuesSchema.optional(),
  hand: CoilHandSchema.optional(),
}

type Issue = (path: string, message: string) => void

function checkCoil({ wireDiameterMm, meanDiameterMm }: { wireDiameterMm: number, meanDiameterMm: number }, issue: Issue): void {
  if (meanDiameterMm < 1.5 * wireDiameterMm) {
    issue('meanDiameterMm', `A mean diameter of ${meanDiameterMm} mm is under one and a half times the wire (${wireDiameterMm} mm): no coil can be wound so tightly.`)
  }
}

function checkCounts({ activeCoils, bodyCoils }: { activeCoils?: number | undefined, bodyCoils?: number | undefined }, issue: Issue): void {
  if (activeCoils === undefined && bodyCoils === undefined) issue('bodyCoils', 'Give the coils in the body (bodyCoils) or the active coils (activeCoils).')
  if (activeCoils !== undefined && bodyCoils !== undefined && bodyCoils > activeCoils) {
    issue('activeCoils', `The active coils (${activeCoils}) cannot be fewer than those in the body (${bodyCoils}).`)
  }
}

export const EvaluateCompressionSchema = z.strictObject({
  kind: z.literal('compression'),
  ...wound,
  activeCoils: ActiveCoils,
  totalCoils: quantity('The total number of coils', '', { min: 0.1, max: 100_010 }).optional(),
  freeLengthMm: FreeLengthMm,
  points: z.array(EvaluatePointSchema).max(6, MOST_POINTS).optional(),
  ...compressionConditions,
}) satisfies z.ZodType<CompressionInput>

export const EvaluateExtensionSchema = z.strictObject({
  kind: z.literal('extension'),
  ...wound,
  activeCoils: ActiveCoils.optional(),
  bodyCoils: BodyCoils.optional(),
  initialTensionN: quantity('The initial tension', 'N', { min: 0, max: 1_000_000 }),
  insideHooksFreeLengthMm: FreeLengthMm.optional(),
  points: z.array(EvaluatePointSchema).max(6, MOST_POINTS).optional(),
  ...extensionConditions,
}) satisfies z.ZodType<ExtensionInput>

export const EvaluateTorsionSchema = z.strictObject({
  kind: z.literal('torsion'),
  ...wound,
  activeCoils: ActiveCoils.optional(),
  bodyCoils: BodyCoils.optional(),
  mandrelMm: quantity('The mandrel', 'mm', { min: 0.01, max: 5000 }).optional(),
  points: z.array(EvaluateTorsionPointSchema).max(6, MOST_POINTS).optional(),
  ...torsionConditions,
}) satisfies z.ZodType<TorsionInput>

const KIND_ERROR = 'The kind must be compression, extension or torsion.'

/** Body of `POST /api/v1/springs/evaluate`. */
export const EvaluateRequestSchema = z
  .discriminatedUnion('kind', [EvaluateCompressionSchema, EvaluateExtensionSchema, EvaluateTorsionSchema], { error: KIND_ERROR })
  .check((ctx) => {
    const spring = ctx.value
    const issue: Issue = (path, message) => ctx.issues.push({ code: 'custom', path: [path], input: spring, message })
    checkCoil(spring, issue)
    if (spring.kind === 'compression') {
      const { activeCoils, totalCoils } = spring
      if (totalCoils !== undefined && totalCoils < activeCoils) issue('totalCoils', `The total number of coils (${totalCoils}) cannot be less than the active ones (${activeCoils}).`)
      return
    }
    checkCounts(spring, issue)
    if (spring.kind === 'torsion' && spring.mandrelMm !== undefined && spring.fit?.rodMm !== undefined && spring.mandrelMm !== spring.fit.rodMm) {
      issue('mandrelMm', `The mandrel (${spring.mandrelMm} mm) and the rod of the fit (${spring.fit.rodMm} mm) are the same thing: give one of them.`)
    }
  })

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

const woundEvaluation = {
  springIndex: number,
  stressCorrectionFactor: number,
  outerDiameterMm: number,
  innerDiameterMm: number,
  wireLengthMm: number,
  massG: number,
  tensileStrengthMpa: number.nullable(),
  allowableStressMpa: number.nullable(),
  checks: z.array(CheckSchema).readonly(),
  tolerances: z.array(ToleranceSchema).readonly(),
  assumptions: z.array(z.string()).readonly(),
  fatigue: z.object({
    method: z.string(),
    meanStressMpa: number,
    amplitudeMpa: number,
    allowableAmplitudeMpa: number,
    safetyFactor: number,
    life: number,
    lifeFractionSafetyFactor: number.nullable(),
  }).nullable(),
}

const loadPoints = z.array(z.object({
  lengthMm: number,
  deflectionMm: number,
  forceN: number,
  stressMpa: number,
  correctedStressMpa: number,
  utilisation: number.nullable(),
})).readonly()

/** Answer of `POST /api/v1/springs/evaluate`. */
export const EvaluateResponseSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('compression'),
    ...woundEvaluation,
    rateNPerMm: number,
    totalCoils: number,
    points: loadPoints,
    solidLengthMm: number,
    solid: z.object({ forceN: number, stressMpa: number, correctedStressMpa: number }),
    minimumClearanceMm: number,
    shortestLengthMm: number,
    outerDiameterAtSolidMm: number,
    pitchMm: number,
    naturalFrequencyHz: number,
    impact: z.object({ speedMPerS: number, stressMpa: number }).nullable(),
    buckling: z.object({ slenderness: number, criticalDeflectionMm: number.nullable(), ok: z.boolean() }),
    rateAtTemperatureNPerMm: number.nullable(),
  }),
  z.object({
    kind: z.literal('extension'),
    ...woundEvaluation,
    rateNPerMm: number,
    points: loadPoints,
    activeCoils: number,
    bodyCoils: number,
    coilsEquivalent: number,
    bodyLengthMm: number,
    insideHooksFreeLengthMm: number,
    hookLengthMm: number,
    hookBendRadiusMm: number,
    hookSideBendRadiusMm: number,
    initialTensionN: number,
    initialStressMpa: number,
    initialStressRangeMpa: z.tuple([number, number]).readonly(),
    hookBendingStressMpa: number.nullable(),
    hookTorsionStressMpa: number.nullable(),
    hookBendingLimitMpa: number.nullable(),
    hookTorsionLimitMpa: number.nullable(),
    greatestForceN: number.nullable(),
    greatestLengthMm: number.nullable(),
    rateAtTemperatureNPerMm: number.nullable(),
  }),
  z.object({
    kind: z.literal('torsion'),
    ...woundEvaluation,
    rateNmmPerDeg: number,
    rateNmmPerTurn: number,
    points: z.array(z.object({
      angleDeg: number,
      momentNmm: number,
      bendingStressMpa: number,
      correctedStressMpa: number,
      utilisation: number.nullable(),
      innerDiameterAtPointMm: number,
      bodyLengthMm: number,
    })).readonly(),
    activeCoils: number,
    bodyCoils: number,
    legCoils: number,
    bodyLengthMm: number,
    legDeflectionDeg: number.nullable(),
    greatestMomentNmm: number.nullable(),
    greatestAngleDeg: number.nullable(),
    recommendedRodMm: number,
    rateAtTemperatureNmmPerDeg: number.nullable(),
  }),
]) satisfies z.ZodType<SpringEvaluation, unknown>

export type EvaluateResponse = z.infer<typeof EvaluateResponseSchema>
