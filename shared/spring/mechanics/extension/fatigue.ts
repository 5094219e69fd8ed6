import { bendingGoodmanFactor } from '../bending-fatigue'
import { goodmanZimmerliFactor } from '../fatigue'
import { hasLifeFractions } from '../fatigue-data'
import { shearStressMpa } from '../stress'
import { stressCorrectionFactor } from '../stress-factors'
import type { ExtensionModel } from './model'
import { greatestExtensionForceN, hookBendingMpa, hookTorsionMpa, leastExtensionForceN, type ExtensionState } from './state'

/** Where an extension spring breaks first. */
export type FatiguePlace = 'body' | 'hook-bending' | 'hook-torsion'

/** Corrected shear stress in the body, MPa. */
export const correctedBodyStressMpa = (model: ExtensionModel, state: ExtensionState, forceN: number): number =>
  stressCorrectionFactor(model.method, state.springIndex) * shearStressMpa(forceN, state.meanDiameterMm, model.wireDiameterMm)

/** Stress of a place at a force, MPa. */
export function stressAtPlaceMpa(place: FatiguePlace, model: ExtensionModel, state: ExtensionState, forceN: number): number {
  switch (place) {
    case 'body': return correctedBodyStressMpa(model, state, forceN)
    case 'hook-bending': return hookBendingMpa(model, state, forceN)
    case 'hook-torsion': return hookTorsionMpa(model, state, forceN)
  }
}

/** Goodman safety factor of a place between the working loads, not peened: shot does not reach closed coils. */
export function fatigueFactorAt(place: FatiguePlace, model: ExtensionModel, state: ExtensionState): number {
  const high = stressAtPlaceMpa(place, model, state, greatestExtensionForceN(state))
  const low = stressAtPlaceMpa(place, model, state, leastExtensionForceN(state))
  const amplitude = (high - low) / 2
  const mean = (high + low) / 2
  return place === 'hook-bending'
    ? bendingGoodmanFactor(amplitude, mean, model.tensileStrengthMpa)
    : goodmanZimmerliFactor(amplitude, mean, model.tensileStrengthMpa, false)
}

/** The place with the least safety factor. */
export function weakestPlace(model: ExtensionModel, state: ExtensionState): FatiguePlace {
  const body = fatigueFactorAt('body', model, state)
  const bending = fatigueFactorAt('hook-bending', model, state)
  const torsion = fatigueFactorAt('hook-torsion', model, state)
  return body <= bending && body <= torsion ? 'body' : bending <= torsion ? 'hook-bending' : 'hook-torsion'
}

/** The least Goodman safety factor of body and hooks. */
export function extensionFatigueFactor(model: ExtensionModel, state: ExtensionState): number {
  return Math.min(fatigueFactorAt('body', model, state), fatigueFactorAt('hook-bending', model, state), fatigueFactorAt('hook-torsion', model, state))
}

// Greatest stress from zero over tensile strength, not peened, at 1e5, 1e6, 1e7 strokes (handbook values, from memory).
const FRACTIONS: Readonly<Record<FatiguePlace, readonly [number, number, number]>> = {
  'body': [0.36, 0.33, 0.3], 'hook-torsion': [0.34, 0.3, 0.28], 'hook-bending': [0.51, 0.47, 0.45],
}

function fractionAt(place: FatiguePlace, cycles: number): number {
  const [five, six, seven] = FRACTIONS[place]
  const decade = Math.log10(cycles)
  if (decade >= 7) return seven
  return decade < 6 ? five + (six - five) * (decade - 5) : six + (seven - six) * (decade - 6)
}

/**
 * Least factor of the published fractions, stress from zero to the greatest load; null for lives under 1e5 strokes and wire they
 * are not published for, and without a pull. A least load above nought is not counted, which is safe.
 */
export function extensionLifeFractionFactor(model: ExtensionModel, state: ExtensionState): number | null {
  const force = greatestExtensionForceN(state)
  if (model.cycles < 1e5 || !hasLifeFractions(model) || !(force > 0)) return null
  const places: readonly FatiguePlace[] = ['body', 'hook-bending', 'hook-torsion']
  return Math.min(...places.map(place => (fractionAt(place, model.cycles) * model.tensileStrengthMpa) / stressAtPlaceMpa(place, model, state, force)))
}

/** A place in words. */
export const PLACE_WORDS: Readonly<Record<FatiguePlace, string>> = {
  'body': 'the body', 'hook-bending': 'bending in the hooks', 'hook-torsion': 'torsion where the hooks leave the body',
}
