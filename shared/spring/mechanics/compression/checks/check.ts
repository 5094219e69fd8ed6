import type { SpringCheck } from '../../checks/check'
import type { CompressionModel } from '../model'
import type { CompressionState } from '../state'

/** One check of a compression spring. */
export type CompressionCheck = SpringCheck<CompressionModel, CompressionState>
