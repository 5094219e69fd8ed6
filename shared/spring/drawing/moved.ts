import type { HookForm } from '../codes'
import type { CompressionEvaluation, CompressionInput } from '../mechanics/compression/types'
import { totalCoilsFor } from '../mechanics/compression/end-geometry'
import type { ExtensionEvaluation, ExtensionInput } from '../mechanics/extension/types'
import type { Leg, TorsionEvaluation, TorsionInput } from '../mechanics/torsion/types'
import type { DrawnSpring } from './drawn-spring'

/** What a drawing needs of a compression spring and its evaluation. */
export interface MovedCompression {
  readonly kind: 'compression'
  readonly spring: CompressionInput
  readonly evaluation: Pick<CompressionEvaluation, 'rateNPerMm' | 'solidLengthMm' | 'shortestLengthMm' | 'allowableStressMpa' | 'points' | 'tolerances'>
}

/** The same of an extension spring. */
export interface MovedExtension {
  readonly kind: 'extension'
  readonly spring: ExtensionInput
  readonly evaluation: Pick<
    ExtensionEvaluation,
    'rateNPerMm' | 'bodyCoils' | 'insideHooksFreeLengthMm' | 'hookLengthMm' | 'bodyLengthMm' | 'initialTensionN' | 'greatestForceN' | 'greatestLengthMm' | 'points' | 'tolerances'
  >
}

/** The same of a torsion spring. */
export interface MovedTorsion {
  readonly kind: 'torsion'
  readonly spring: TorsionInput
  readonly evaluation: Pick<
    TorsionEvaluation, 'rateNmmPerDeg' | 'bodyCoils' | 'activeCoils' | 'bodyLengthMm' | 'greatestMomentNmm' | 'greatestAngleDeg' | 'points' | 'tolerances'
  >
}

/** A spring of any kind with what was worked out of it: a kept design is one, and so is any evaluated spring. */
export type MovedSpring = MovedCompression | MovedExtension | MovedTorsion

/** The shape of a compression spring. */
export function drawnCompression({ wireDiameterMm, meanDiameterMm, activeCoils, totalCoils, freeLengthMm, ends = 'closed-ground', hand = 'right' }: CompressionInput): DrawnSpring {
  return { wireDiameterMm, meanDiameterMm, activeCoils, totalCoils: totalCoils ?? totalCoilsFor(ends, activeCoils), freeLengthMm, ends, hand }
}

/** What has to be known of an extension spring to draw it to scale. */
export interface DrawnExtension {
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly bodyCoils: number
  /** Inside the hooks, unloaded. */
  readonly freeLengthMm: number
  readonly hookLengthMm: number
  readonly hookForm: HookForm
  readonly hand: 'left' | 'right'
}

/** The shape of an extension spring. */
export function drawnExtension({ spring, evaluation }: Pick<MovedExtension, 'spring' | 'evaluation'>): DrawnExtension {
  return {
    wireDiameterMm: spring.wireDiameterMm, meanDiameterMm: spring.meanDiameterMm, bodyCoils: evaluation.bodyCoils, freeLengthMm: evaluation.insideHooksFreeLengthMm,
    hookLengthMm: evaluation.hookLengthMm, hookForm: spring.hook?.form ?? 'full-loop', hand: spring.hand ?? 'right',
  }
}

/** What has to be known of a torsion spring to draw it to scale. */
export interface DrawnTorsion {
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly bodyCoils: number
  /** Body coils over active coils: the share of the angle that winds the body. */
  readonly bodyShare: number
  readonly legs: readonly Leg[]
  readonly loadOpens: boolean
  readonly hand: 'left' | 'right'
}

/** The shape of a torsion spring. */
export function drawnTorsion({ spring, evaluation }: Pick<MovedTorsion, 'spring' | 'evaluation'>): DrawnTorsion {
  return {
    wireDiameterMm: spring.wireDiameterMm, meanDiameterMm: spring.meanDiameterMm, bodyCoils: evaluation.bodyCoils, bodyShare: evaluation.bodyCoils / evaluation.activeCoils,
    legs: spring.legs ?? [], loadOpens: spring.loadOpens ?? false, hand: spring.hand ?? 'right',
  }
}

const MOST_DRAWN_COILS = 500
const areSizes = (...sizes: readonly number[]) => sizes.every(size => Number.isFinite(size) && size > 0)

/** True if an extension spring's sizes are positive, its hooks stand off its body, and its coils can be told apart. */
export function isDrawableExtension({ wireDiameterMm: d, meanDiameterMm: D, bodyCoils, freeLengthMm, hookLengthMm }: DrawnExtension): boolean {
  return areSizes(d, D, bodyCoils, freeLengthMm, hookLengthMm) && D > d && bodyCoils >= 0.5 && bodyCoils <= MOST_DRAWN_COILS
}

/** True if a torsion spring's sizes are positive. */
export function isDrawableTorsion({ wireDiameterMm: d, meanDiameterMm: D, bodyCoils, bodyShare }: DrawnTorsion): boolean {
  return areSizes(d, D, bodyCoils, bodyShare) && D > d && bodyCoils >= 0.5 && bodyCoils <= MOST_DRAWN_COILS
}
