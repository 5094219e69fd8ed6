import { z } from 'zod'
import {
  COIL_HANDS, COMPRESSION_ENDS, HOOK_FORMS, LEG_FORMS, MATERIAL_CODES, SEATING_COEFFICIENTS, STRESS_METHODS, SURROUNDINGS, TOLERANCE_GRADES,
} from '../../spring/codes'

/**
 * A finite number within physical bounds. The bounds are generous: they keep nonsense and overflow out, the checks of the
 * calculation say what is sensible.
 */
export function quantity(what: string, unit: string, bounds: { min: number, max: number }) {
  const range = `${what} must be from ${bounds.min} to ${bounds.max}${unit ? ` ${unit}` : ''}.`
  return z
    .number({ error: issue => (issue.input === undefined ? `${what} is missing.` : `${what} must be a number.`) })
    .min(bounds.min, { error: range })
    .max(bounds.max, { error: range })
}

function choice<const T extends readonly [string, ...string[]]>(what: string, values: T) {
  return z.enum(values, { error: `${what} must be one of: ${values.join(', ')}.` })
}

export const MaterialCodeSchema = choice('The material', MATERIAL_CODES)
export const CompressionEndsSchema = choice('The ends', COMPRESSION_ENDS)
export const StressMethodSchema = choice('The method', STRESS_METHODS)
export const CoilHandSchema = choice('The direction of coiling', COIL_HANDS)
export const SurroundingsSchema = choice('The surroundings', SURROUNDINGS)
export const ToleranceGradeSchema = z.literal([...TOLERANCE_GRADES], { error: 'The tolerance grade must be 1, 2 or 3.' })
export const SeatingCoefficientSchema = z.literal([...SEATING_COEFFICIENTS], {
  error: 'The seating coefficient must be 0.5, 0.707, 1 or 2.',
})

export const WireDiameterMm = quantity('The wire diameter', 'mm', { min: 0.01, max: 100 })
export const LengthMm = quantity('The length', 'mm', { min: 0.01, max: 20_000 })
export const ForceN = quantity('The force', 'N', { min: 0.0001, max: 10_000_000 })
export const RateNPerMm = quantity('The rate', 'N/mm', { min: 0.00001, max: 10_000_000 })
export const MomentNmm = quantity('The moment', 'N mm', { min: 0.0001, max: 1_000_000_000 })
export const AngleDeg = quantity('The angle', 'degrees', { min: 0.001, max: 360_000 })
export const RateNmmPerDeg = quantity('The rate', 'N mm per degree', { min: 0.0000001, max: 100_000_000 })
export const FreeLengthMm = quantity('The free length', 'mm', { min: 0.01, max: 20_000 })
export const TemperatureC = quantity('The temperature', '°C', { min: -273, max: 1500 })

export const DutySchema = z.strictObject({
  cycles: quantity('The number of strokes in its life', '', { min: 0, max: 1e12 }).optional(),
  strokesPerMinute: quantity('The strokes per minute', '', { min: 0, max: 100_000 }).optional(),
})

export const FitSchema = z
  .strictObject({
    boreMm: quantity('The bore', 'mm', { min: 0.01, max: 5000 }).optional(),
    rodMm: quantity('The rod', 'mm', { min: 0.01, max: 5000 }).optional(),
    maxFreeLengthMm: quantity('The longest free length', 'mm', { min: 0.01, max: 20_000 }).optional(),
    maxSolidLengthMm: quantity('The longest solid length', 'mm', { min: 0.01, max: 20_000 }).optional(),
  })
  .check((ctx) => {
    const { boreMm, rodMm, maxFreeLengthMm, maxSolidLengthMm } = ctx.value
    if (boreMm !== undefined && rodMm !== undefined && boreMm <= rodMm) {
      ctx.issues.push({
        code: 'custom',
        path: ['boreMm'],
        input: boreMm,
        message: `The bore (${boreMm} mm) must be larger than the rod (${rodMm} mm): the spring lies between them.`,
      })
    }
    if (maxFreeLengthMm !== undefined && maxSolidLengthMm !== undefined && maxSolidLengthMm > maxFreeLengthMm) {
      ctx.issues.push({
        code: 'custom',
        path: ['maxSolidLengthMm'],
        input: maxSolidLengthMm,
        message: `The longest solid length (${maxSolidLengthMm} mm) cannot exceed the longest free length (${maxFreeLengthMm} mm).`,
      })
    }
  })

export const MaterialValuesSchema = z.strictObject({
  tensileStrengthMpa: quantity('The tensile strength', 'MPa', { min: 50, max: 10_000 }).optional(),
  shearModulusMpa: quantity('The shear modulus', 'MPa', { min: 1000, max: 500_000 }).optional(),
  youngsModulusMpa: quantity('Young\'s modulus', 'MPa', { min: 1000, max: 1_000_000 }).optional(),
  densityKgPerM3: quantity('The density', 'kg/m3', { min: 500, max: 25_000 }).optional(),
})

/** Fields of every kind that evaluating and sizing share. */
export const springConditions = {
  method: StressMethodSchema.optional(),
  temperatureC: TemperatureC.optional(),
  duty: DutySchema.optional(),
  shotPeened: z.boolean({ error: 'shotPeened must be true or false.' }).optional(),
  preset: z.boolean({ error: 'preset must be true or false.' }).optional(),
  toleranceGrade: ToleranceGradeSchema.optional(),
  fit: FitSchema.optional(),
}

export const compressionConditions = {
  ...springConditions,
  ends: CompressionEndsSchema.optional(),
  seatingCoefficient: SeatingCoefficientSchema.optional(),
  guided: z.boolean({ error: 'guided must be true or false.' }).optional(),
  solidSafe: z.boolean({ error: 'solidSafe must be true or false.' }).optional(),
}

const BendRadiusMm = quantity('The bend radius', 'mm', { min: 0.005, max: 5000 })

export const HookSchema = z.strictObject({
  form: choice('The form of the hooks', HOOK_FORMS),
  bendRadiusMm: BendRadiusMm.optional(),
  sideBendRadiusMm: BendRadiusMm.optional(),
})
export const extensionConditions = { ...springConditions, hook: HookSchema.optional() }

export const LegSchema = z.strictObject({
  lengthMm: quantity('The length of the leg', 'mm', { min: 0.01, max: 5000 }),
  form: choice('The form of the leg', LEG_FORMS),
})
export const torsionConditions = {
  ...springConditions,
  legs: z.array(LegSchema, { error: 'Legs must be a list of lengths and forms.' }).max(2, { error: 'At most two legs.' }).optional(),
  loadOpens: z.boolean({ error: 'loadOpens must be true or false.' }).optional(),
}
