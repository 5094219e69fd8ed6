import { figure } from '../figure'
import { ZIMMERLI_THICKEST_WIRE_MM } from '../fatigue'
import { meanDiameterToleranceMm } from '../tolerances/mean-diameter'
import { storedEnergyJ } from './bending'
import type { TorsionModel } from './model'
import { greatestMomentNmm, type TorsionState } from './state'

/** What the result takes for granted, in sentences. */
export function describeTorsionAssumptions(model: TorsionModel, state: TorsionState): string[] {
  const said = [
    'Round wire, closed coils, turned about the axis of the body; rate and moments are those at 20 °C.',
    model.method === 'en13906'
      ? 'Rate by bending theory, E d^4/(3667 D n) for each degree (EN 13906-3): friction between coils, or on a rod, is not in it and takes more moment turning up than it gives back.'
      : 'Rate E d^4/(3888 D n) for each degree, which allows for friction between the coils (Shigley).',
    model.legs.length > 0
      ? 'The legs add (l1 + l2)/(3 pi D) turns, as for loads at their ends across the leg (Shigley); the bends from body to leg are not judged.'
      : 'The body alone: no legs.',
    'Wound up, the body shrinks to D Nb/(Nb + turns) and grows longer by a wire for each turn.',
    `Tensile strength is the least of ${model.material.standard} (${model.material.strength.source}), or the value given.`,
    'A torsion spring wants a rod to guide it and a stop that ends its travel.',
    model.loadOpens
      ? 'Stress left by coiling is not counted; the load opens the coil, so it adds to the stress of the load at the inner fibre.'
      : 'Stress left by coiling is not counted: it helps where the load winds the coil up, and heat only sets the angle of the legs (Machinery\'s Handbook).',
  ]
  if (model.legs.some(({ form }) => form === 'straight')) said.push('Straight legs are counted as tangential ones of the same length: nothing is published for them here.')
  if (state.greatestAngleDeg > 0) {
    const energy = storedEnergyJ(greatestMomentNmm(state), state.greatestAngleDeg)
    said.push(`At the greatest angle it holds ${figure(energy)} J and lets go of it at once: hold both legs and guard the eyes when loading or testing (common practice, no source).`)
  }
  if (model.preset) said.push('Presetting is not counted.')
  if (Number.isNaN(model.temperatureC)) said.push('Room temperature.')
  if (Number.isNaN(meanDiameterToleranceMm(state.meanDiameterMm, state.springIndex, model.grade))) said.push('No diameter tolerances are published for this size: none are given.')
  said.push('Tolerances of leg lengths and of the angle between the legs are to be agreed: none are known here.')
  if (model.cycles > 0) {
    said.push(`Fatigue: steel wire to ${ZIMMERLI_THICKEST_WIRE_MM} mm, Zimmerli's data for unlimited life in torsion over 0.577 in bending (Shigley, for hooks; taken for torsion springs); corrosion not counted.`)
    if (model.shotPeened) said.push('Shot peening counts only in the published fractions.')
    if (!Number.isNaN(state.greatestAngleDeg) && Number.isNaN(state.leastAngleDeg)) said.push('With one working point the spring is taken to be let go fully in every stroke.')
  }
  return said
}
