import type { CoilHand, MaterialCode } from '../../codes'
import { torsionLimit, type StaticLimit } from '../static-limits'
import type { MaterialValues } from '../types'
import { buildWireModel, type EvaluationContext, type WireModel } from '../wire-model'
import { innerFibreFactor } from './bending'
import type { Leg, TorsionConditions } from './types'

/** Everything about material, wire, legs and use that does not change with mean diameter and coils. */
export interface TorsionModel extends WireModel {
  readonly staticLimit: StaticLimit
  /** Less by a fifth where the load opens the coil. */
  readonly allowableStressMpa: number
  readonly legs: readonly Leg[]
  readonly legsLengthMm: number
  readonly loadOpens: boolean
  /** Null where either will do. */
  readonly hand: CoilHand | null
}

/** Bending stress allowed where the load opens the coil, as a share of that where it winds up (public page of a spring stockist). */
export const OPENING_SHARE = 0.8

/** Resolves defaults and material values once for a wire. `mandrelMm` is the rod where `fit` names none. */
export function buildTorsionModel(
  spring: {
    readonly material: MaterialCode
    readonly wireDiameterMm: number
    readonly materialValues?: MaterialValues | undefined
    readonly mandrelMm?: number | undefined
    readonly hand?: CoilHand | undefined
  },
  conditions: TorsionConditions,
  context: EvaluationContext = {},
): TorsionModel {
  const wire = buildWireModel(spring, conditions, context)
  const limit = torsionLimit(wire.method, wire.material.family, innerFibreFactor)
  const legs = conditions.legs ?? []
  const loadOpens = conditions.loadOpens ?? false
  // Onto the wire's own object: a copy of so many fields costs more than all the rest, and sizing makes one for each wire.
  const own: Omit<TorsionModel, Exclude<keyof WireModel, 'rodMm'>> = {
    rodMm: Number.isNaN(wire.rodMm) ? spring.mandrelMm ?? Number.NaN : wire.rodMm,
    staticLimit: limit,
    allowableStressMpa: limit.fractionOfStrength * wire.tensileStrengthMpa * (loadOpens ? OPENING_SHARE : 1),
    legs,
    legsLengthMm: legs.reduce((sum, leg) => sum + leg.lengthMm, 0),
    loadOpens,
    hand: spring.hand ?? null,
  }
  return Object.assign(wire, own)
}
