import type { MaterialCode, SpringKind, Surroundings } from '../codes'
import type { CompressionConditions } from '../mechanics/compression/types'
import type { ExtensionConditions } from '../mechanics/extension/types'
import type { EvaluationOf, InputOf } from '../mechanics/spring'
import type { TorsionConditions } from '../mechanics/torsion/types'

/** A load at a length. */
export interface LoadPoint {
  readonly lengthMm: number
  readonly forceN: number
}

/** A moment at an angle. */
export interface MomentPoint {
  readonly angleDeg: number
  readonly momentNmm: number
}

/** What every size request may say beside what the spring must do. */
export interface SizeOptions {
  readonly surroundings?: Surroundings | undefined
  /** How many designs to return, best first; 5 unless told. */
  readonly limit?: number | undefined
  /** Coil counts (active of compression, body of the others) are whole multiples of this; continuous where absent. */
  readonly coilStep?: number | undefined
  /** Mean diameters are whole multiples of this, mm; continuous where absent. */
  readonly diameterStepMm?: number | undefined
}

/**
 * What a compression spring must do. Two points; or one point and a rate; or one point and a free length; or one point
 * alone (rate free); or a rate and a free length without a point. Points in order of rising force.
 */
export interface CompressionSizeRequest extends CompressionConditions, SizeOptions {
  readonly kind: 'compression'
  readonly points: readonly LoadPoint[]
  readonly rateNPerMm?: number | undefined
  readonly freeLengthMm?: number | undefined
}

/** The same for an extension spring; lengths, the free length too, are those inside the hooks. The initial tension follows. */
export interface ExtensionSizeRequest extends ExtensionConditions, SizeOptions {
  readonly kind: 'extension'
  readonly points: readonly LoadPoint[]
  readonly rateNPerMm?: number | undefined
  readonly freeLengthMm?: number | undefined
}

/**
 * What a torsion spring must do. Two points, or one point and a rate: angles are then counted from any fixed place, in the
 * direction of loading, and where the spring is free follows. One point alone: its angle is counted from free.
 */
export interface TorsionSizeRequest extends TorsionConditions, SizeOptions {
  readonly kind: 'torsion'
  readonly points: readonly MomentPoint[]
  readonly rateNmmPerDeg?: number | undefined
}

interface SizeRequests { compression: CompressionSizeRequest, extension: ExtensionSizeRequest, torsion: TorsionSizeRequest }
export type SizeRequestOf<K extends SpringKind> = SizeRequests[K]
export type SpringSizeRequest = SizeRequestOf<SpringKind>

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
  /** Coils wound: total coils of compression springs, body coils of the others. */
  readonly totalCoils: number
  /** Compression: free length. Extension: inside the hooks. Torsion: the body. */
  readonly freeLengthMm: number
  readonly wireLengthMm: number
  readonly massG: number
  readonly outerDiameterMm: number
  /** Of extension springs. */
  readonly initialTensionN?: number | undefined
}

/** A spring that was found, of one kind. `spring` is what `evaluate` takes, points included. */
export interface SizedDesignOf<K extends SpringKind, W extends SizingWire = SizingWire> {
  readonly kind: K
  readonly wireId: string
  readonly wire: W
  readonly material: MaterialCode
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly activeCoils: number
  /** As in the candidate, with `freeLengthMm`. */
  readonly totalCoils: number
  readonly freeLengthMm: number
  readonly objectiveValue: number
  readonly spring: InputOf<K>
  readonly evaluation: EvaluationOf<K>
}
export type SizedDesign<W extends SizingWire = SizingWire> = { [K in SpringKind]: SizedDesignOf<K, W> }[SpringKind]

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
