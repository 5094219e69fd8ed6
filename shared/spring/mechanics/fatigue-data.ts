import { LONGEST_PUBLISHED_LIFE, ZIMMERLI_THICKEST_WIRE_MM } from './fatigue'
import { figure } from './figure'
import type { WireModel } from './wire-model'

/** Why published fatigue data do not cover a wire, in a sentence; null where they do. Zimmerli's are for steel wire under 10 mm. */
export function fatigueDataProblem(model: WireModel): string | null {
  if (model.material.family === 'copper-alloy') return `The fatigue data used are for steel wire; a life cannot be shown for ${model.material.name}.`
  return model.wireDiameterMm > ZIMMERLI_THICKEST_WIRE_MM
    ? `Zimmerli's fatigue data end at ${ZIMMERLI_THICKEST_WIRE_MM} mm wire; a life cannot be shown for ${model.wireDiameterMm} mm.`
    : null
}

/**
 * True where the fractions of tensile strength by life may be read for the wire: they are published for music wire and 302, and read
 * here for other cold-drawn carbon and stainless wire too, which every sentence that shows them says.
 */
export const hasLifeFractions = (model: WireModel): boolean => model.material.family === 'cold-drawn-carbon' || model.material.family === 'stainless'

/** A factor by those fractions in a sentence, with the life it is really read at; nothing where there is none. */
export function lifeFractionWords(factor: number | null, cycles: number): string {
  if (factor === null) return ''
  const at = cycles > LONGEST_PUBLISHED_LIFE ? `${figure(LONGEST_PUBLISHED_LIFE)} strokes, the longest life published` : `${figure(cycles)} strokes`
  return ` By the fractions of tensile strength published for music wire and 302, at ${at}, it is ${figure(factor)}.`
}

/** True where published fatigue data cover the wire; numbers only, for the search. */
export const hasFatigueData = (model: WireModel): boolean => model.material.family !== 'copper-alloy' && !(model.wireDiameterMm > ZIMMERLI_THICKEST_WIRE_MM)
