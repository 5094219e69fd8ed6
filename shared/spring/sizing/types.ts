import type { MaterialCode, Surroundings } from '../codes'
import type { CompressionConditions, CompressionEvaluation } from '../mechanics/types'

/** A load at a length. */
export interface LoadPoint {
  readonly lengthMm: number
  readonly forceN: number
}

/**
 * What a compression spring must do. Two points; or one point and a rate; or one point and a free length; or one point
 * alone (rate free); or a rate and a free length without a point. Points in order of rising force.
 */
export interface CompressionSizeRequest extends CompressionConditions {
  readonly kind: 'compression'
  readonly points: readonly LoadPoint[]
  readonly rateNPerMm?: number | undefined
  readonly freeLengthMm?: number | undefined
  readonly surroundings?: Surroundings | undefined
  /** How many designs to return, best first; 5 unless told. */
  readonly limit?: number | undefined
  /** Coil counts are whole multiples of this; continuous where absent. */
  readonly coilStep?: number | undefined
  /** Mean diameters are whole multiples of this, mm; continuous where absent. */
  readonly diameterStepMm?: number | undefined
}

/** A wire that may be used. More fields (price, stock) may travel along; they are handed back untouched. */
export interface SizingWire {
  readonly id: string
  readonly material: MaterialCode
  readonly wireDiameterMm: number
  /** False cautions that the wire must be bought. */
  readonly stocked?: boolean | undefined
}

/** One spring from one wire, as the objective sees it: numbers only, before the full evaluation. */
export interface SizingCandidate<W extends SizingWire = SizingWire> {
  readonly wire: W
  readonly meanDiameterMm: number
  readonly activeCoils: number
  readonly totalCoils: number
  readonly freeLengthMm: number
  readonly rateNPerMm: number
  readonly wireLengthMm: number
  readonly massG: number
  readonly solidLengthMm: number
  readonly outerDiameterMm: number
}

export interface SizedDesign<W extends SizingWire = SizingWire> {
  readonly wireId: string
  readonly wire: W
  readonly material: MaterialCode
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly activeCoils: number
  readonly totalCoils: number
  readonly freeLengthMm: number
  readonly objectiveValue: number
  readonly evaluation: CompressionEvaluation
}

/** One requirement changed by as little as admits a spring. */
export interface SizingChange<W extends SizingWire = SizingWire> {
  /** Path in the request, such as `fit.boreMm` or `points.1.forceN`. */
  readonly path: string
  readonly from: number
  readonly to: number
  readonly design: SizedDesign<W>
}

export interface SizingConflict<W extends SizingWire = SizingWire> {
  /** Paths of a smallest set of requirements that cannot hold together. */
  readonly requirements: readonly string[]
  readonly changes: readonly SizingChange<W>[]
}

export interface SizingResult<W extends SizingWire = SizingWire> {
  readonly designs: readonly SizedDesign<W>[]
  readonly searched: { readonly wires: number, readonly feasibleWires: number }
  readonly conflict: SizingConflict<W> | null
}
