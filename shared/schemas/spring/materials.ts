import { z } from 'zod'
import { MaterialCodeSchema } from './common'

const origin = z.enum(['published', 'from memory', 'computed'])
const sourced = z.object({ value: z.number(), origin, source: z.string() })
const modulus = z.union([
  sourced,
  z.object({ steps: z.array(z.object({ upToMm: z.number().nullable(), valueMpa: z.number() })), origin, source: z.string() }),
])

/** A wire material with the values that calculations use and where each comes from. `upToMm: null` is any thicker wire. */
export const MaterialSchema = z.object({
  code: MaterialCodeSchema,
  name: z.string(),
  standard: z.string(),
  family: z.enum(['cold-drawn-carbon', 'tempered-steel', 'stainless', 'copper-alloy']),
  wireDiameterFromMm: z.number(),
  wireDiameterToMm: z.number(),
  youngsModulusMpa: modulus,
  shearModulusMpa: modulus,
  densityKgPerM3: sourced,
  temperatureLimitC: sourced,
  /** Loss of both moduli for each kelvin over 20 °C, as a share. */
  modulusLossPerKelvin: sourced,
  stressReliefTempC: z.number(),
  stressReliefMinutes: z.number(),
  stressReliefOrigin: origin,
  stressReliefSource: z.string(),
  resistsCorrosion: z.boolean(),
  corrosionNote: z.string(),
  strengthSource: z.string(),
  strengthOrigin: origin,
  /** Diameters the wire is usually sold in, each with its least tensile strength. */
  standardWires: z.array(z.object({ wireDiameterMm: z.number(), tensileStrengthMpa: z.number() })),
  /** Diameters that can be bought now. */
  catalogueDiametersMm: z.array(z.number()),
})

/** Answer of `GET /api/v1/materials`. */
export const MaterialsResponseSchema = z.object({ materials: z.array(MaterialSchema) })
export type MaterialsResponse = z.infer<typeof MaterialsResponseSchema>
