import { ZIMMERLI_THICKEST_WIRE_MM } from '../fatigue'
import { isWithinToleranceScope } from './tolerances'
import { figure } from '../figure'
import type { CompressionModel } from './model'
import { statePitchMm, type CompressionState } from './state'

const PITCH_ANGLE_LIMIT_DEG = 8

/** What the result takes for granted, in sentences. */
export function describeAssumptions(model: CompressionModel, state: CompressionState): string[] {
  const said = [
    'Round wire, cylindrical coils, axial load; rate and forces are those at 20 °C.',
    model.method === 'en13906'
      ? `Solid length by EN 13906-1: coils at the thickest wire its tolerance allows (${figure(model.solidWireMm)} mm).`
      : 'Solid length as in the textbooks: coils at the nominal wire diameter.',
    `Each end seated as the coefficient ${model.seating} says (EN 13906-1); the natural frequency is that with both ends seated.`,
    `Tensile strength is the least of ${model.material.standard} (${model.material.strength.source}), or the value given.`,
  ]
  if (model.method === 'en13906' && !model.preset) {
    said.push('The limit of 0.56 of the tensile strength is stated for springs that are preset; not preset, it may settle when first pressed solid.')
  }
  if (model.method === 'en13906' && (model.ends === 'open' || model.ends === 'open-ground')) {
    said.push('EN 13906-1 covers closed ends; the solid length of open ends follows the textbooks.')
  }
  if (Number.isNaN(model.temperatureC)) said.push('Room temperature.')
  if (!isWithinToleranceScope(model, state)) said.push('EN 15800 publishes no tolerances for this size: none are given.')
  if (model.cycles > 0) {
    said.push(`Fatigue: steel wire to ${ZIMMERLI_THICKEST_WIRE_MM} mm, Zimmerli's data for unlimited life; corrosion and surge not counted.`)
    if (!Number.isNaN(state.shortestLengthMm) && Number.isNaN(state.longestLengthMm)) {
      said.push('With one working point the spring is taken to be released fully in every stroke.')
    }
  }
  const pitchAngleDeg = (Math.atan(statePitchMm(model, state) / (Math.PI * state.meanDiameterMm)) * 180) / Math.PI
  if (pitchAngleDeg > PITCH_ANGLE_LIMIT_DEG) {
    said.push(`The pitch angle is ${figure(pitchAngleDeg)} degrees; above ${PITCH_ANGLE_LIMIT_DEG} degrees the rate formula is more than 1 % off.`)
  }
  return said
}
