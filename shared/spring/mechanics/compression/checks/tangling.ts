import { finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import { statePitchMm } from '../state'
import type { CompressionCheck } from './check'

/**
 * Whether springs hook into each other in the box: the wire of one goes between the coils of another where they stand further apart
 * than it is thick, and an open end lets it in (common practice, no source). It costs time in finishing and packing, no more.
 */
export const tanglingCheck: CompressionCheck = {
  code: 'tangling',
  applies: () => true,
  stops: () => false,
  describe: (model, state) => {
    const gap = statePitchMm(model, state) - model.wireDiameterMm
    const isOpen = model.ends === 'open' || model.ends === 'open-ground'
    const tangles = gap > model.wireDiameterMm
    const says = `The gap between coils is ${figure(gap)} mm, the wire ${figure(model.wireDiameterMm)} mm`
    return finishCheck('tangling', { stop: false, caution: tangles }, gap, model.wireDiameterMm, {
      stop: '',
      caution: `${says}: springs will tangle in bulk${isOpen ? ', the more for their open ends' : ''} (common practice); pack them in layers, or wind the end coils closed.`,
      pass: `${says}: another spring's wire does not go between them (common practice).`,
    }, 'note')
  },
}
