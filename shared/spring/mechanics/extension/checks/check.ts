import type { SpringCheck } from '../../checks/check'
import type { ExtensionModel } from '../model'
import type { ExtensionState } from '../state'

/** One check of an extension spring. */
export type ExtensionCheck = SpringCheck<ExtensionModel, ExtensionState>

export const hasPoint = (state: ExtensionState): boolean => !Number.isNaN(state.longestLengthMm)
export const hasStrength = (model: ExtensionModel): boolean => !Number.isNaN(model.tensileStrengthMpa)
