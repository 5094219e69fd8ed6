import { z } from 'zod'
import { SPRING_KINDS } from '../../spring/codes'
import { checkSizeRequirement } from '../../spring/sizing/check-requirement'
import type { SpringSizeRequest } from '../../spring/sizing/types'
import {
  AngleDeg, ForceN, FreeLengthMm, LengthMm, MaterialCodeSchema, MomentNmm, RateNPerMm, RateNmmPerDeg, SurroundingsSchema, WireDiameterMm,
  compressionConditions, extensionConditions, quantity, torsionConditions,
} from './common'
import { EvaluateRequestSchema, EvaluateResponseSchema } from './evaluate'

export const SizePointSchema = z.strictObject({ lengthMm: LengthMm, forceN: ForceN })
export const SizeMomentPointSchema = z.strictObject({ angleDeg: AngleDeg, momentNmm: MomentNmm })

export const SizeObjectiveSchema = z.enum(['price', 'mass', 'stress'], { error: 'The objective must be price, mass or stress.' })
export type SizeObjective = z.infer<typeof SizeObjectiveSchema>

/** Wires that one request may name: each costs some search, and the request is answered at once. */
const MOST_NAMED_WIRES = 200
const MOST_POINTS = { error: 'At most two points.' }
const LIMIT_ERROR = { error: 'The limit must be from 1 to 20.' }

const options = {
  materials: z.array(MaterialCodeSchema).min(1, { error: 'Name at least one material, or leave the field out.' }).max(20).optional(),
  wireDiametersMm: z.array(WireDiameterMm).min(1, { error: 'Name at least one wire diameter, or leave the field out.' }).max(200, { error: 'At most 200 wire diameters.' }).optional(),
  surroundings: SurroundingsSchema.optional(),
  objective: SizeObjectiveSchema.default('price'),
  quantity: z.int({ error: 'The quantity must be a whole number.' }).min(1, { error: 'The quantity must be at least 1.' }).max(10_000_000, { error: 'The quantity must be at most 10000000.' }).optional(),
  limit: z.int({ error: 'The limit must be a whole number.' }).min(1, LIMIT_ERROR).max(20, LIMIT_ERROR).default(5),
  coilStep: quantity('The coil step', '', { min: 0.05, max: 2 }).optional(),
  diameterStepMm: quantity('The diameter step', 'mm', { min: 0.005, max: 5 }).optional(),
}
const loadPoints = z.array(SizePointSchema, { error: 'Points must be a list of lengths and forces.' }).max(2, MOST_POINTS)

/** Body of `POST /api/v1/springs/size`. */
export const SizeRequestSchema = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('compression'), points: loadPoints, rateNPerMm: RateNPerMm.optional(), freeLengthMm: FreeLengthMm.optional(), ...options, ...compressionConditions }),
    z.strictObject({ kind: z.literal('extension'), points: loadPoints, rateNPerMm: RateNPerMm.optional(), freeLengthMm: FreeLengthMm.optional(), ...options, ...extensionConditions }),
    z.strictObject({
      kind: z.literal('torsion'), points: z.array(SizeMomentPointSchema, { error: 'Points must be a list of angles and moments.' }).max(2, MOST_POINTS),
      rateNmmPerDeg: RateNmmPerDeg.optional(), ...options, ...torsionConditions,
    }),
  ], { error: 'The kind must be compression, extension or torsion.' })
  .check((ctx) => {
    for (const { path, message } of checkSizeRequirement(ctx.value)) {
      ctx.issues.push({ code: 'custom', path: [...path], input: ctx.value, message })
    }
    const named = new Set(ctx.value.wireDiametersMm).size * new Set(ctx.value.materials).size
    if (named > MOST_NAMED_WIRES) {
      ctx.issues.push({
        code: 'custom',
        path: ['wireDiametersMm'],
        input: ctx.value.wireDiametersMm,
        message: `These are ${named} wires, each material in each diameter. Name at most ${MOST_NAMED_WIRES} at once.`,
      })
    }
    if (ctx.value.wireDiametersMm !== undefined && ctx.value.materials !== undefined && ctx.value.objective === 'price') {
      ctx.issues.push({
        code: 'custom',
        path: ['objective'],
        input: ctx.value.objective,
        message: 'Wires named by material and diameter may lie outside the catalogue and have no price: ask for mass or stress.',
      })
    }
  }) satisfies z.ZodType<SpringSizeRequest, unknown>

export type SizeRequest = z.infer<typeof SizeRequestSchema>

export const SizedDesignSchema = z.object({
  kind: z.enum(SPRING_KINDS),
  material: MaterialCodeSchema,
  wireDiameterMm: z.number(),
  meanDiameterMm: z.number(),
  activeCoils: z.number(),
  totalCoils: z.number(),
  freeLengthMm: z.number(),
  objectiveValue: z.number(),
  /** The whole spring, as `evaluate` takes it. */
  spring: EvaluateRequestSchema,
  evaluation: EvaluateResponseSchema,
})

/** Answer of `POST /api/v1/springs/size`. */
export const SizeResponseSchema = z.object({
  designs: z.array(SizedDesignSchema),
  searched: z.object({ wires: z.number(), feasibleWires: z.number() }),
  conflict: z.object({
    requirements: z.array(z.string()),
    changes: z.array(z.object({ path: z.string(), from: z.number(), to: z.number(), design: SizedDesignSchema })),
  }).nullable(),
})

export type SizeResponse = z.infer<typeof SizeResponseSchema>
