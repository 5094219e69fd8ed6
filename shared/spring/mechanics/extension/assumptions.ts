import { figure } from '../figure'
import { ZIMMERLI_THICKEST_WIRE_MM } from '../fatigue'
import { hookOrigin } from './hooks'
import type { ExtensionModel } from './model'
import { greatestExtensionForceN, type ExtensionState } from './state'
import { listExtensionTolerances } from './tolerances'

// Angle between the planes of the two hooks by coils (Machinery's Handbook, Table 9, degrees either way).
const HOOK_ANGLES: readonly (readonly [number, number])[] = [[6, 25], [9, 35], [12, 45], [16, 60]]

function hookAngleWords(bodyCoils: number): string {
  const row = HOOK_ANGLES.find(([to]) => bodyCoils <= to)
  return row
    ? `The planes of the two hooks may be up to ${row[1]} degrees apart unless agreed (Machinery's Handbook, Table 9).`
    : 'The planes of the two hooks lie at random unless agreed (Machinery\'s Handbook, Table 9).'
}

/** Work in the spring at its greatest working length, J: the mean of initial tension and load, times the pull. NaN without a point. */
function storedWorkJ(state: ExtensionState): number {
  return ((state.initialTensionN + greatestExtensionForceN(state)) / 2) * (state.longestLengthMm - state.freeLengthMm) / 1000
}

/** What the result takes for granted, in sentences. */
export function describeExtensionAssumptions(model: ExtensionModel, state: ExtensionState): string[] {
  const said = [
    'Round wire, coils closed at rest, axial load through the hooks; rate and forces are those at 20 °C.',
    `Rate with ${figure(state.activeCoils - state.bodyCoils)} coils for the two hooks (G/E${model.hookForm === 'full-loop' ? ', Shigley' : ', stated for full loops and taken for these too'}).`,
    `Hooks: ${hookOrigin(model.hookForm)}.`,
    Number.isNaN(model.bendRadiusMm)
      ? 'The hooks are bent to half the mean diameter.'
      : `The hooks are bent to a mean radius of ${figure(model.bendRadiusMm)} mm.`,
    Number.isNaN(model.sideBendRadiusMm)
      ? 'They leave the body in a bend of half the inside diameter (as in Shigley, example 10-6).'
      : `They leave the body in a bend of ${figure(model.sideBendRadiusMm)} mm mean radius.`,
    hookAngleWords(state.bodyCoils),
    `Tensile strength is the least of ${model.material.standard} (${model.material.strength.source}), or the value given.`,
    'The limits of the hooks are those of Shigley, Table 10-7, by either method: EN 13906-2 leaves hooks to the maker (from memory).',
    'An extension spring has no stop of its own: something else must keep it from being pulled too far.',
  ]
  const stored = storedWorkJ(state)
  if (stored > 0) said.push(`At the greatest load the spring holds ${figure(stored)} J. A hook that breaks lets go of it at once: whoever fits the spring decides whether hands near it need a guard.`)
  if (model.preset) said.push('Presetting is not counted: closed coils cannot be pressed solid.')
  if (model.shotPeened) said.push('Shot peening is not counted: shot does not reach between closed coils.')
  if (Number.isNaN(model.temperatureC)) said.push('Room temperature.')
  if (listExtensionTolerances(model, state).length === 0) said.push('No tolerances are published for this size: none are given.')
  else if (model.grade !== 2) said.push('The free length tolerances of DIN 2097 are known here for grade 2 only: none is given.')
  if (model.cycles > 0) {
    said.push(`Fatigue: steel wire to ${ZIMMERLI_THICKEST_WIRE_MM} mm, Zimmerli's data for unlimited life in torsion, over 0.577 in bending (Shigley); corrosion not counted.`)
    if (!Number.isNaN(state.longestLengthMm) && Number.isNaN(state.shortestLengthMm)) said.push('With one working point the spring is taken to be let go fully in every stroke.')
  }
  return said
}
