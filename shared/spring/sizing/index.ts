export { sizeSpring, type SizingOptions } from './size-spring'
export { searchWires, type SearchOptions, type SearchOutcome, type SizingObjective } from './search-wires'
export { minimiseBounded, type BoundedMinimum, type BoundedOptions, type BoundedProblem } from './bounded-minimum'
export { describeConflict } from './describe-conflict'
export { checkSizeRequirement } from './check-requirement'
export type { RequirementProblem } from './requirement-problem'
export type {
  CompressionSizeRequest, ExtensionSizeRequest, LoadPoint, MomentPoint, SizedDesign, SizedDesignOf, SizeRequestOf, SizingCandidate, SizingChange,
  SizingConflict, SizingResult, SizingWire, SpringSizeRequest, TorsionSizeRequest,
} from './types'
