export { sizeCompression, type SizingOptions } from './compression/size'
export { searchWires, type SearchOptions, type SearchOutcome, type SizingObjective } from './search-wires'
export { describeConflict } from './describe-conflict'
export { checkSizeRequirement, type RequirementProblem } from './check-requirement'
export {
  impliedRateAndFreeLength, resolveRequirement, type FieldError, type RequirementField, type RequirementForm,
  type RequirementResolution, type ResolvedRequirement,
} from './resolve-requirement'
export type {
  CompressionSizeRequest, LoadPoint, SizedDesign, SizingCandidate, SizingChange, SizingConflict, SizingResult, SizingWire,
} from './types'
