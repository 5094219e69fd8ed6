import type { CompressionEnds, SeatingCoefficient } from '../../codes'
import type { PointInput, PointResult, SpringConditions, WoundEvaluation, WoundSpring } from '../types'

/** What evaluating and sizing share: how the spring is made, seated and used. */
export interface CompressionConditions extends SpringConditions {
  readonly ends?: CompressionEnds | undefined
  /** Default 0.5: both ends on flat parallel seats. */
  readonly seatingCoefficient?: SeatingCoefficient | undefined
  /** A guide other than the bore or the rod of `fit` keeps it straight. */
  readonly guided?: boolean | undefined
  /** False: going solid is excluded by the design, so the stress there only cautions. */
  readonly solidSafe?: boolean | undefined
}

/** A compression spring fully described. Lengths in mm, forces in N. */
export interface CompressionInput extends WoundSpring, CompressionConditions {
  readonly kind: 'compression'
  readonly activeCoils: number
  /** Default: the active coils and the end coils of the form. */
  readonly totalCoils?: number | undefined
  readonly freeLengthMm: number
  /** Working positions in order of rising force, up to 6. */
  readonly points?: readonly PointInput[] | undefined
}

export interface CompressionEvaluation extends WoundEvaluation {
  readonly kind: 'compression'
  readonly rateNPerMm: number
  readonly totalCoils: number
  readonly points: readonly PointResult[]
  readonly solidLengthMm: number
  readonly solid: { readonly forceN: number, readonly stressMpa: number, readonly correctedStressMpa: number }
  /** Sum of the least gaps between coils, Sa. */
  readonly minimumClearanceMm: number
  /** Solid length and least gaps, Ln. */
  readonly shortestLengthMm: number
  readonly outerDiameterAtSolidMm: number
  readonly pitchMm: number
  readonly naturalFrequencyHz: number
  /** Greatest speed of the moving end and the stress its wave adds; null without strokes a minute and a point. */
  readonly impact: { readonly speedMPerS: number, readonly stressMpa: number } | null
  readonly buckling: { readonly slenderness: number, readonly criticalDeflectionMm: number | null, readonly ok: boolean }
  /** Rate at the working temperature; null where none is given. */
  readonly rateAtTemperatureNPerMm: number | null
}
