import type { HookForm } from '../../codes'
import type { PointInput, PointResult, SpringConditions, WoundEvaluation, WoundSpring } from '../types'

/** The two hooks, alike. Radii are mean radii of the wire's centre line, mm. */
export interface Hook {
  readonly form: HookForm
  /** r1 of the hook itself; half the mean diameter where absent. */
  readonly bendRadiusMm?: number | undefined
  /** r2 of the bend from the body into the hook; where absent the calculation states what it takes. */
  readonly sideBendRadiusMm?: number | undefined
}

/** What evaluating and sizing share. */
export interface ExtensionConditions extends SpringConditions {
  /** Full loops where absent. */
  readonly hook?: Hook | undefined
}

/** An extension spring fully described. At least one of the two coil counts is given; the other follows by the hooks' equivalent G/E. */
export interface ExtensionInput extends WoundSpring, ExtensionConditions {
  readonly kind: 'extension'
  readonly activeCoils?: number | undefined
  readonly bodyCoils?: number | undefined
  readonly initialTensionN: number
  /** Free length between the insides of the hooks; where absent that of the hook form. */
  readonly insideHooksFreeLengthMm?: number | undefined
  /** Working positions in order of rising force, up to 6; lengths are inside the hooks. */
  readonly points?: readonly PointInput[] | undefined
}

export interface ExtensionEvaluation extends WoundEvaluation {
  readonly kind: 'extension'
  readonly rateNPerMm: number
  readonly points: readonly PointResult[]
  readonly activeCoils: number
  readonly bodyCoils: number
  /** Coils that the two hooks together work like. */
  readonly coilsEquivalent: number
  /** Closed body, (Nb + 1) d. */
  readonly bodyLengthMm: number
  readonly insideHooksFreeLengthMm: number
  /** From the inside of a hook to the body. */
  readonly hookLengthMm: number
  readonly hookBendRadiusMm: number
  readonly hookSideBendRadiusMm: number
  readonly initialTensionN: number
  /** Uncorrected. */
  readonly initialStressMpa: number
  /** Least and greatest sensible initial stress for the index. */
  readonly initialStressRangeMpa: readonly [number, number]
  /** At the greatest working load; null without a point. */
  readonly hookBendingStressMpa: number | null
  readonly hookTorsionStressMpa: number | null
  readonly hookBendingLimitMpa: number | null
  readonly hookTorsionLimitMpa: number | null
  /** Least of the loads at which body, hook bending or hook torsion reach their limits, and the length there; null without a strength. */
  readonly greatestForceN: number | null
  readonly greatestLengthMm: number | null
  /** Rate at the working temperature; null where none is given. */
  readonly rateAtTemperatureNPerMm: number | null
}
