import type { CoilHand, MaterialCode, StressMethod, ToleranceGrade } from '../codes'

/** Values that replace the table's for one calculation. */
export interface MaterialValues {
  readonly tensileStrengthMpa?: number | undefined
  readonly shearModulusMpa?: number | undefined
  readonly youngsModulusMpa?: number | undefined
  readonly densityKgPerM3?: number | undefined
}

export interface Duty {
  /** Strokes in the spring's life. */
  readonly cycles?: number | undefined
  readonly strokesPerMinute?: number | undefined
}

export interface Fit {
  readonly boreMm?: number | undefined
  readonly rodMm?: number | undefined
  readonly maxFreeLengthMm?: number | undefined
  readonly maxSolidLengthMm?: number | undefined
}

/** One working position, given by exactly one of the three. */
export type PointInput =
  | { readonly lengthMm: number }
  | { readonly forceN: number }
  | { readonly deflectionMm: number }

/** What evaluating and sizing share for every kind: how the spring is made and used. */
export interface SpringConditions {
  readonly method?: StressMethod | undefined
  readonly temperatureC?: number | undefined
  readonly duty?: Duty | undefined
  readonly shotPeened?: boolean | undefined
  readonly preset?: boolean | undefined
  readonly toleranceGrade?: ToleranceGrade | undefined
  readonly fit?: Fit | undefined
}

/** What describes a spring outright, whatever its kind. Lengths in mm. */
export interface WoundSpring {
  readonly material: MaterialCode
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly materialValues?: MaterialValues | undefined
  readonly hand?: CoilHand | undefined
}

export type CheckSeverity = 'stop' | 'caution' | 'note'

export interface Check {
  readonly code: string
  readonly ok: boolean
  /** How grave it is, or would be if it failed. */
  readonly severity: CheckSeverity
  readonly value: number | null
  readonly limit: number | null
  readonly message: string
}

export interface Tolerance {
  readonly quantity: string
  readonly nominal: number
  readonly plusMinus: number
  readonly grade: ToleranceGrade
  readonly source: string
}

export interface PointResult {
  readonly lengthMm: number
  readonly deflectionMm: number
  readonly forceN: number
  /** 8 F D / (pi d^3), uncorrected. */
  readonly stressMpa: number
  readonly correctedStressMpa: number
  /** Stress the method compares with the limit, over the limit; null where no strength is known. */
  readonly utilisation: number | null
}

export interface FatigueResult {
  readonly method: string
  readonly meanStressMpa: number
  readonly amplitudeMpa: number
  readonly allowableAmplitudeMpa: number
  readonly safetyFactor: number
  /** Strokes asked for. */
  readonly life: number
  /** Safety factor by published fractions of tensile strength at that life; null outside their range. */
  readonly lifeFractionSafetyFactor: number | null
}

/** What every evaluation gives, whatever the kind. Lengths mm, masses g, stresses MPa at 20 °C. */
export interface WoundEvaluation {
  readonly springIndex: number
  readonly stressCorrectionFactor: number
  readonly outerDiameterMm: number
  readonly innerDiameterMm: number
  readonly wireLengthMm: number
  readonly massG: number
  /** Null where the standard does not cover the wire and no strength is given; the same for the allowable stress. */
  readonly tensileStrengthMpa: number | null
  readonly allowableStressMpa: number | null
  readonly checks: readonly Check[]
  readonly tolerances: readonly Tolerance[]
  readonly assumptions: readonly string[]
  readonly fatigue: FatigueResult | null
}
