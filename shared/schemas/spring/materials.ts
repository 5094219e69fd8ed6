import { z } from 'zod'
import { MaterialCodeSchema } from './common'

const sourced = z.object({ value: z.number(), origin: z.enum(['published', 'from memory', 'computed']), source: z.string() })
const modulus = z.union([
  sourced,
  z.object({ steps: z.array(z.object({ upToMm: z.number().nullable(), valueMpa: z.number() })), origin: z.enum(['published', 'from memory', 'computed']), source: z.string() }),
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
  stressReliefTempC: z.number(),
  stressReliefMinutes: z.number(),
  resistsCorrosion: z.boolean(),
  corrosionNote: z.string(),
  strengthSource: z.string(),
  /** Diameters that can be bought now. */
  catalogueDiametersMm: z.array(z.number()),
})

/** Answer of `GET /api/v1/materials`. */
export const MaterialsResponseSchema = z.object({ materials: z.array(MaterialSchema) })
export type MaterialsResponse = z.infer<typeof MaterialsResponseSchema>
