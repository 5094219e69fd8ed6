export { evaluateSpring } from './evaluate-spring'
export { evaluateExtension } from './extension/evaluate'
export { evaluateTorsion } from './torsion/evaluate'
export { evaluateCompression } from './compression/evaluate'
export type { EvaluationContext } from './wire-model'
export { activeCoilsForRate, rateNPerMm } from './rate'
export { forceAtStressN, shearStressMpa } from './stress'
export { bergstraesserFactor, directShearFactor, stressCorrectionFactor, wahlFactor } from './stress-factors'
export { activeCoilsFor, pitchMm, solidLengthMm, totalCoilsFor, type SolidLengthConvention } from './compression/end-geometry'
export { wireLengthMm, wireMassG } from './wire-length'
export { minimumClearanceMm } from './compression/clearance'
export { growthAtSolidMm, growthPitchMm, outerDiameterAtSolidFixedEndsMm } from './compression/diameter-growth'
export { criticalBucklingDeflectionMm } from './compression/buckling'
export { naturalFrequencyHz } from './compression/natural-frequency'
export { modulusAtTemperatureMpa } from './temperature'
export { staticLimit } from './static-limits'
export {
  gerberAmplitudeMpa, gerberEnduranceMpa, goodmanAmplitudeMpa, goodmanEnduranceMpa, goodmanZimmerliFactor, lifeFraction,
  lifeFractionFactor, shearUltimateMpa, soderbergFactor, ZIMMERLI_PEENED, ZIMMERLI_UNPEENED,
} from './fatigue'
export { meanDiameterToleranceMm } from './tolerances/mean-diameter'
export { freeLengthToleranceMm, loadToleranceN, parallelismMm, squarenessMm } from './tolerances/load-and-length'
export type {
  Check, CheckSeverity, Duty, FatigueResult, Fit, MaterialValues,
  PointInput, PointResult, Tolerance,
} from './types'
export type { CompressionConditions, CompressionEvaluation, CompressionInput } from './compression/types'
export type { EvaluationOf, InputOf, SpringEvaluation, SpringInput } from './spring'
export type { ExtensionConditions, ExtensionEvaluation, ExtensionInput, Hook } from './extension/types'
export type { Leg, TorsionConditions, TorsionEvaluation, TorsionInput, TorsionPointInput, TorsionPointResult } from './torsion/types'
