import type { CompressionEnds, MaterialCode } from '../../codes'
import { greatestWireDiameterMm } from '../../materials'
import { staticLimit, type StaticLimit } from '../static-limits'
import type { MaterialValues } from '../types'
import { buildWireModel, type EvaluationContext, type WireModel } from '../wire-model'
import type { SolidLengthConvention } from './end-geometry'
import type { CompressionConditions } from './types'

/** Everything about material, wire, making and use that does not change with mean diameter, coils and free length. */
export interface CompressionModel extends WireModel {
  readonly allowableStressMpa: number
  readonly staticLimit: StaticLimit
  readonly ends: CompressionEnds
  readonly convention: SolidLengthConvention
  /** The wire the solid length is counted in: greatest or nominal. */
  readonly solidWireMm: number
  readonly seating: number
  readonly solidSafe: boolean
  readonly guided: boolean
}

/** Resolves defaults and material values once for a wire. */
export function buildCompressionModel(
  spring: { readonly material: MaterialCode, readonly wireDiameterMm: number, readonly materialValues?: MaterialValues | undefined },
  conditions: CompressionConditions,
  context: EvaluationContext = {},
): CompressionModel {
  const wire = buildWireModel(spring, conditions, context)
  const { method, wireDiameterMm: d, boreMm, rodMm } = wire
  const limit = staticLimit(method, wire.material.family, wire.preset)
  const convention = method === 'en13906' ? 'en' : 'textbook'
  // Onto the wire's own object: a copy of so many fields costs more than all the rest, and sizing makes one for each wire.
  const own: Omit<CompressionModel, keyof WireModel> = {
    allowableStressMpa: limit.fractionOfStrength * wire.tensileStrengthMpa,
    staticLimit: limit,
    ends: conditions.ends ?? 'closed-ground',
    convention,
    solidWireMm: convention === 'en' ? greatestWireDiameterMm(d) : d,
    seating: conditions.seatingCoefficient ?? 0.5,
    solidSafe: conditions.solidSafe ?? true,
    guided: (conditions.guided ?? false) || !Number.isNaN(boreMm) || !Number.isNaN(rodMm),
  }
  return Object.assign(wire, own)
}
