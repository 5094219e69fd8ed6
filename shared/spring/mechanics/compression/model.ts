import type { CompressionEnds, MaterialCode, StressMethod, Surroundings, ToleranceGrade } from '../../codes'
import { getMaterial, greatestWireDiameterMm, minimumTensileStrengthMpa, modulusMpa, type Material } from '../../materials'
import { DYNAMIC_CYCLES } from './clearance'
import type { SolidLengthConvention } from './end-geometry'
import { staticLimit, type StaticLimit } from '../static-limits'
import { stressCorrectionFactor } from '../stress-factors'
import type { MaterialValues } from '../types'
import type { CompressionConditions } from './types'

/** What the caller knows beyond the spring itself. */
export interface EvaluationContext {
  /** Whether the wire lies in stock; leave out where that means nothing. */
  readonly stocked?: boolean | undefined
  readonly surroundings?: Surroundings | undefined
}

/** Everything about material, wire, making and use that does not change with mean diameter, coils and free length. */
export interface CompressionModel {
  readonly material: Material
  readonly wireDiameterMm: number
  readonly shearModulusMpa: number
  readonly youngsModulusMpa: number
  /** G/E. */
  readonly moduli: number
  readonly densityKgPerM3: number
  /** NaN where the standard does not cover the diameter and the caller gave none. */
  readonly tensileStrengthMpa: number
  readonly allowableStressMpa: number
  readonly staticLimit: StaticLimit
  readonly wireProblem: string | null
  readonly method: StressMethod
  readonly ends: CompressionEnds
  readonly convention: SolidLengthConvention
  /** The wire the solid length is counted in: greatest or nominal. */
  readonly solidWireMm: number
  readonly seating: number
  readonly grade: ToleranceGrade
  readonly cycles: number
  readonly dynamic: boolean
  readonly strokesPerMinute: number
  readonly shotPeened: boolean
  readonly preset: boolean
  readonly solidSafe: boolean
  readonly guided: boolean
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
export function buildCompressionModel(
  spring: { readonly material: MaterialCode, readonly wireDiameterMm: number, readonly materialValues?: MaterialValues | undefined },
  conditions: CompressionConditions,
  context: EvaluationContext = {},
): CompressionModel {
  const material = getMaterial(spring.material)
  const d = spring.wireDiameterMm
  const own = spring.materialValues ?? {}
  const method = conditions.method ?? 'en13906'
  const preset = conditions.preset ?? false
  const strength = minimumTensileStrengthMpa(material, d)
  const tensile = own.tensileStrengthMpa ?? (strength.known ? strength.minimumMpa : Number.NaN)
  const limit = staticLimit(method, material.family, preset, w => stressCorrectionFactor(method, w))
  const G = own.shearModulusMpa ?? modulusMpa(material.shearModulus, d)
  const E = own.youngsModulusMpa ?? modulusMpa(material.youngsModulus, d)
  const cycles = conditions.duty?.cycles ?? 0
  const fit = conditions.fit ?? {}
  const convention = method === 'en13906' ? 'en' : 'textbook'
  return {
    material,
    wireDiameterMm: d,
    shearModulusMpa: G,
    youngsModulusMpa: E,
    moduli: G / E,
    densityKgPerM3: own.densityKgPerM3 ?? material.densityKgPerM3.value,
    tensileStrengthMpa: tensile,
    allowableStressMpa: limit.fractionOfStrength * tensile,
    staticLimit: limit,
    wireProblem: strength.known ? null : strength.reason,
    method,
    ends: conditions.ends ?? 'closed-ground',
    convention,
    solidWireMm: convention === 'en' ? greatestWireDiameterMm(d) : d,
    seating: conditions.seatingCoefficient ?? 0.5,
    grade: conditions.toleranceGrade ?? 2,
    cycles,
    dynamic: cycles > DYNAMIC_CYCLES,
    strokesPerMinute: conditions.duty?.strokesPerMinute ?? 0,
    shotPeened: conditions.shotPeened ?? false,
    preset,
    solidSafe: conditions.solidSafe ?? true,
    guided: (conditions.guided ?? false) || fit.boreMm !== undefined || fit.rodMm !== undefined,
    boreMm: fit.boreMm ?? Number.NaN,
    rodMm: fit.rodMm ?? Number.NaN,
    maxFreeLengthMm: fit.maxFreeLengthMm ?? Number.NaN,
    maxSolidLengthMm: fit.maxSolidLengthMm ?? Number.NaN,
    temperatureC: conditions.temperatureC ?? Number.NaN,
    context,
  }
}
