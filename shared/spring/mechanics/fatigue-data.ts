import { ZIMMERLI_THICKEST_WIRE_MM } from './fatigue'
import type { WireModel } from './wire-model'

/** Why published fatigue data do not cover a wire, in a sentence; null where they do. Zimmerli's are for steel wire under 10 mm. */
export function fatigueDataProblem(model: WireModel): string | null {
  if (model.material.family === 'copper-alloy') return `The fatigue data used are for steel wire; a life cannot be shown for ${model.material.name}.`
  return model.wireDiameterMm > ZIMMERLI_THICKEST_WIRE_MM
    ? `Zimmerli's fatigue data end at ${ZIMMERLI_THICKEST_WIRE_MM} mm wire; a life cannot be shown for ${model.wireDiameterMm} mm.`
    : null
}

/** True where published fatigue data cover the wire; numbers only, for the search. */
export const hasFatigueData = (model: WireModel): boolean => model.material.family !== 'copper-alloy' && !(model.wireDiameterMm > ZIMMERLI_THICKEST_WIRE_MM)
