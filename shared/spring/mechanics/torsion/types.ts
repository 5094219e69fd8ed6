import type { LegForm } from '../../codes'
import type { SpringConditions, WoundEvaluation, WoundSpring } from '../types'

/** One leg: its length from the body to where the load acts, mm. */
export interface Leg {
  readonly lengthMm: number
  readonly form: LegForm
}

/** One working position, by the angle turned from free in the loading direction or by the moment. */
export type TorsionPointInput =
  | { readonly angleDeg: number }
  | { readonly momentNmm: number }

/** What evaluating and sizing share. */
export interface TorsionConditions extends SpringConditions {
  /** None, or two: the body alone where absent or empty. */
  readonly legs?: readonly Leg[] | undefined
  /** True where the load opens the coil instead of winding it up. */
  readonly loadOpens?: boolean | undefined
}

/** A torsion spring fully described. At least one of the two coil counts is given; the other follows by the legs' share. */
export interface TorsionInput extends WoundSpring, TorsionConditions {
  readonly kind: 'torsion'
  readonly activeCoils?: number | undefined
  readonly bodyCoils?: number | undefined
  /** The rod it works on; the same as `fit.rodMm`. */
  readonly mandrelMm?: number | undefined
  /** In order of rising moment, up to 6. */
  readonly points?: readonly TorsionPointInput[] | undefined
}

export interface TorsionPointResult {
  /** Turned from free. */
  readonly angleDeg: number
  readonly momentNmm: number
  /** 32 M / (pi d^3), uncorrected. */
  readonly bendingStressMpa: number
  readonly correctedStressMpa: number
  /** Stress the method compares with the limit, over the limit; null where no strength is known. */
  readonly utilisation: number | null
  readonly innerDiameterAtPointMm: number
  readonly bodyLengthMm: number
}

export interface TorsionEvaluation extends WoundEvaluation {
  readonly kind: 'torsion'
  readonly rateNmmPerDeg: number
  readonly rateNmmPerTurn: number
  readonly points: readonly TorsionPointResult[]
  readonly activeCoils: number
  readonly bodyCoils: number
  /** Turns that the two legs together work like. */
  readonly legCoils: number
  /** Closed body unloaded, (Nb + 1) d. */
  readonly bodyLengthMm: number
  /** The legs' own share of the angle at the greatest moment; null without a point. */
  readonly legDeflectionDeg: number | null
  /** Moment and angle at which the body reaches its limit; null without a strength. */
  readonly greatestMomentNmm: number | null
  readonly greatestAngleDeg: number | null
  /** Greatest rod that leaves clearance at the greatest working angle (about 0.9 of the wound-down inside diameter). */
  readonly recommendedRodMm: number
  /** Rate at the working temperature; null where none is given. */
  readonly rateAtTemperatureNmmPerDeg: number | null
}
