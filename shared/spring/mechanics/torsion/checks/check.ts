import type { SpringCheck } from '../../checks/check'
import type { TorsionModel } from '../model'
import type { TorsionState } from '../state'

/** One check of a torsion spring. */
export type TorsionCheck = SpringCheck<TorsionModel, TorsionState>

export const hasPoint = (state: TorsionState): boolean => !Number.isNaN(state.greatestAngleDeg)
export const hasStrength = (model: TorsionModel): boolean => !Number.isNaN(model.tensileStrengthMpa)
