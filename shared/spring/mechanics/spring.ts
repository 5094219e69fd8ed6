import type { SpringKind } from '../codes'
import type { CompressionEvaluation, CompressionInput } from './compression/types'
import type { ExtensionEvaluation, ExtensionInput } from './extension/types'
import type { TorsionEvaluation, TorsionInput } from './torsion/types'

interface Inputs { compression: CompressionInput, extension: ExtensionInput, torsion: TorsionInput }
interface Evaluations { compression: CompressionEvaluation, extension: ExtensionEvaluation, torsion: TorsionEvaluation }

/** A spring fully described, of one kind or of any. */
export type InputOf<K extends SpringKind> = Inputs[K]
export type SpringInput = InputOf<SpringKind>

/** Every computed value and check, of one kind or of any. */
export type EvaluationOf<K extends SpringKind> = Evaluations[K]
export type SpringEvaluation = EvaluationOf<SpringKind>
