import type { MaterialCode, StressMethod, Surroundings, ToleranceGrade } from '../codes'
import { getMaterial, minimumTensileStrengthMpa, modulusMpa, type Material } from '../materials'
import type { MaterialValues, SpringConditions } from './types'

/** What the caller knows beyond the spring itself. */
export interface EvaluationContext {
  /** Whether the wire lies in stock; leave out where that means nothing. */
  readonly stocked?: boolean | undefined
  readonly surroundings?: Surroundings | undefined
}

/** Strokes in a life over which the duty counts as dynamic. */
export const DYNAMIC_CYCLES = 1e4

/** What every kind knows of material, wire and use, whatever the coil. */
export interface WireModel {
  readonly material: Material
  readonly wireDiameterMm: number
  readonly shearModulusMpa: number
  readonly youngsModulusMpa: number
  /** G/E. */
  readonly moduli: number
  readonly densityKgPerM3: number
  /** NaN where the standard does not cover the diameter and the caller gave none. */
  readonly tensileStrengthMpa: number
  /** True where the caller gave it in place of the table's. */
  readonly isStrengthGiven: boolean
  readonly wireProblem: string | null
  readonly method: StressMethod
  readonly grade: ToleranceGrade
  readonly cycles: number
  readonly dynamic: boolean
  readonly strokesPerMinute: number
  readonly shotPeened: boolean
  readonly preset: boolean
  /** NaN where not given; the same for the other limits of the fit. */
  readonly boreMm: number
  readonly rodMm: number
  readonly maxFreeLengthMm: number
  readonly maxSolidLengthMm: number
  /** NaN where not given. */
  readonly temperatureC: number
  readonly context: EvaluationContext
}

/** Resolves defaults and material values once for a wire. */
export function buildWireModel(
  spring: { readonly material: MaterialCode, readonly wireDiameterMm: number, readonly materialValues?: MaterialValues | undefined },
  conditions: SpringConditions,
  context: EvaluationContext = {},
): WireModel {
  const material = getMaterial(spring.material)
  const d = spring.wireDiameterMm
  const own = spring.materialValues ?? {}
  const strength = minimumTensileStrengthMpa(material, d)
  const G = own.shearModulusMpa ?? modulusMpa(material.shearModulus, d)
  const E = own.youngsModulusMpa ?? modulusMpa(material.youngsModulus, d)
  const cycles = conditions.duty?.cycles ?? 0
  const fit = conditions.fit ?? {}
  return {
    material,
    wireDiameterMm: d,
    shearModulusMpa: G,
    youngsModulusMpa: E,
    moduli: G / E,
    densityKgPerM3: own.densityKgPerM3 ?? material.densityKgPerM3.value,
    tensileStrengthMpa: own.tensileStrengthMpa ?? (strength.known ? strength.minimumMpa : Number.NaN),
    isStrengthGiven: own.tensileStrengthMpa !== undefined,
    wireProblem: strength.known ? null : strength.reason,
    method: conditions.method ?? 'en13906',
    grade: conditions.toleranceGrade ?? 2,
    cycles,
    dynamic: cycles > DYNAMIC_CYCLES,
    strokesPerMinute: conditions.duty?.strokesPerMinute ?? 0,
    shotPeened: conditions.shotPeened ?? false,
    preset: conditions.preset ?? false,
    boreMm: fit.boreMm ?? Number.NaN,
    rodMm: fit.rodMm ?? Number.NaN,
    maxFreeLengthMm: fit.maxFreeLengthMm ?? Number.NaN,
    maxSolidLengthMm: fit.maxSolidLengthMm ?? Number.NaN,
    temperatureC: conditions.temperatureC ?? Number.NaN,
    context,
  }
}
