import type { SpringKind } from '../codes'
import type { EvaluationOf, InputOf } from '../mechanics/spring'
import type { SizeRequestOf, SizingCandidate, SizingWire } from './types'

/** Which springs of a wire are wanted: the lightest, the least stressed, or every one that another objective may prefer. */
export type WireGoal = 'mass' | 'stress' | 'every'

/** A spring of one wire, before it is evaluated; coils and length as in `SizingCandidate`. */
export interface WireSpring {
  readonly meanDiameterMm: number
  readonly activeCoils: number
  readonly totalCoils: number
  readonly freeLengthMm: number
}

/** What an objective may ask of a spring of a wire; `stressMpa` is the uncorrected stress at the greatest asked load. */
export type WireMeasures = Omit<SizingCandidate, 'wire'> & { readonly stressMpa: number }

/** A request with everything resolved that does not depend on the wire. */
export interface PreparedSearch<K extends SpringKind> {
  /** Springs of the wire for the goal, each passing every stop check; the best of the wire is proven to be among them. */
  readonly search: (wire: SizingWire, goal: WireGoal) => readonly WireSpring[]
  /** True where some spring of the wire passes every stop check. */
  readonly isFeasible: (wire: SizingWire) => boolean
  /** A mass below which no passing spring of the wire lies, g; 0 where none is known. Cheap: wires are left out by it. */
  readonly leastMassG: (wire: SizingWire) => number
  readonly measure: (wire: SizingWire, spring: WireSpring) => WireMeasures
  readonly describe: (wire: SizingWire, spring: WireSpring) => { readonly spring: InputOf<K>, readonly evaluation: EvaluationOf<K> }
}

/** One requirement that can be left out of a request, at its path, to find what clashes. */
export interface DroppableRequirement<K extends SpringKind> {
  readonly path: string
  readonly without: (request: SizeRequestOf<K>) => SizeRequestOf<K>
}

/** Everything sizing must know of a kind of spring. */
export interface KindSearch<K extends SpringKind> {
  readonly kind: K
  /** Throws for a request that was not checked. */
  readonly prepare: (request: SizeRequestOf<K>) => PreparedSearch<K>
  readonly listRequirements: (request: SizeRequestOf<K>) => readonly DroppableRequirement<K>[]
  /** Requirements that hold in every case: what is left to name when all others are dropped. */
  readonly anchorPaths: (request: SizeRequestOf<K>) => readonly string[]
  /** Paths of the numbers of a request of which a change may admit a spring, such as `fit.boreMm` or `points.1.forceN`. */
  readonly changeablePaths: (request: SizeRequestOf<K>) => readonly string[]
}
