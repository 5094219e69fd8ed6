import type {
  CoilHand, CompressionEnds, MaterialCode, SeatingCoefficient, StressMethod, ToleranceGrade,
} from '../codes'

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

/** What evaluating and sizing share: how the spring is made, seated and used. */
export interface CompressionConditions {
  readonly ends?: CompressionEnds | undefined
  /** Default 0.5: both ends on flat parallel seats. */
  readonly seatingCoefficient?: SeatingCoefficient | undefined
  readonly method?: StressMethod | undefined
  readonly temperatureC?: number | undefined
  readonly duty?: Duty | undefined
  readonly shotPeened?: boolean | undefined
  readonly preset?: boolean | undefined
  readonly toleranceGrade?: ToleranceGrade | undefined
  readonly fit?: Fit | undefined
  /** A guide other than the bore or the rod of `fit` keeps it straight. */
  readonly guided?: boolean | undefined
  /** False: going solid is excluded by the design, so the stress there only cautions. */
  readonly solidSafe?: boolean | undefined
}

/** A compression spring fully described. Lengths in mm, forces in N. */
export interface CompressionInput extends CompressionConditions {
  readonly kind: 'compression'
  readonly material: MaterialCode
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly activeCoils: number
  /** Default: the active coils and the end coils of the form. */
  readonly totalCoils?: number | undefined
  readonly freeLengthMm: number
  /** Working positions in order of rising force, up to 6. */
  readonly points?: readonly PointInput[] | undefined
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

export interface CompressionEvaluation {
  readonly springIndex: number
  readonly stressCorrectionFactor: number
  readonly rateNPerMm: number
  readonly outerDiameterMm: number
  readonly innerDiameterMm: number
  readonly totalCoils: number
  readonly wireLengthMm: number
  readonly massG: number
  readonly tensileStrengthMpa: number | null
  readonly allowableStressMpa: number | null
  readonly points: readonly PointResult[]
  readonly checks: readonly Check[]
  readonly tolerances: readonly Tolerance[]
  readonly assumptions: readonly string[]
  readonly solidLengthMm: number
  readonly solid: { readonly forceN: number, readonly stressMpa: number, readonly correctedStressMpa: number }
  /** Sum of the least gaps between coils, Sa. */
  readonly minimumClearanceMm: number
  /** Solid length and least gaps, Ln. */
  readonly shortestLengthMm: number
  readonly outerDiameterAtSolidMm: number
  readonly pitchMm: number
  readonly naturalFrequencyHz: number
  readonly buckling: { readonly slenderness: number, readonly criticalDeflectionMm: number | null, readonly ok: boolean }
  readonly fatigue: FatigueResult | null
  /** Rate at the working temperature; null where none is given. */
  readonly rateAtTemperatureNPerMm: number | null
}
