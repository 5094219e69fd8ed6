import type { HookForm, MaterialCode } from '../../codes'
import { extensionBodyLimit, hookLimits, type StaticLimit } from '../static-limits'
import type { MaterialValues } from '../types'
import { buildWireModel, type EvaluationContext, type WireModel } from '../wire-model'
import { hookCoils } from './hooks'
import type { ExtensionConditions } from './types'

/** Everything about material, wire, hooks and use that does not change with mean diameter, coils and initial tension. */
export interface ExtensionModel extends WireModel {
  readonly staticLimit: StaticLimit
  readonly allowableStressMpa: number
  readonly hookForm: HookForm
  /** NaN where not given: then half the mean diameter. */
  readonly bendRadiusMm: number
  /** NaN where not given: then half the inside diameter. */
  readonly sideBendRadiusMm: number
  readonly hookBendingLimitMpa: number
  readonly hookTorsionLimitMpa: number
  readonly hookBasis: string
  /** Active coils beyond those of the body. */
  readonly hookCoils: number
}

/** Resolves defaults and material values once for a wire. */
export function buildExtensionModel(
  spring: { readonly material: MaterialCode, readonly wireDiameterMm: number, readonly materialValues?: MaterialValues | undefined },
  conditions: ExtensionConditions,
  context: EvaluationContext = {},
): ExtensionModel {
  const wire = buildWireModel(spring, conditions, context)
  const { family } = wire.material
  const limit = extensionBodyLimit(wire.method, family)
  const hooks = hookLimits(family)
  // Onto the wire's own object: a copy of so many fields costs more than all the rest, and sizing makes one for each wire.
  const own: Omit<ExtensionModel, keyof WireModel> = {
    staticLimit: limit,
    allowableStressMpa: limit.fractionOfStrength * wire.tensileStrengthMpa,
    hookForm: conditions.hook?.form ?? 'full-loop',
    bendRadiusMm: conditions.hook?.bendRadiusMm ?? Number.NaN,
    sideBendRadiusMm: conditions.hook?.sideBendRadiusMm ?? Number.NaN,
    hookBendingLimitMpa: hooks.bendingFraction * wire.tensileStrengthMpa,
    hookTorsionLimitMpa: hooks.torsionFraction * wire.tensileStrengthMpa,
    hookBasis: hooks.basis,
    hookCoils: hookCoils(wire.moduli),
  }
  return Object.assign(wire, own)
}
