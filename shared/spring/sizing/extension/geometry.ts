import { bodyLengthMm, hookLengthMm } from '../../mechanics/extension/hooks'
import { greatestInitialStressMpa, usualInitialStressMpa } from '../../mechanics/extension/initial-tension'
import type { ExtensionModel } from '../../mechanics/extension/model'
import { fillExtensionState, type ExtensionState } from '../../mechanics/extension/state'
import { forceAtStressN } from '../../mechanics/stress'
import { firstForceN, type ExtensionTravel } from './travel'

export const LEAST_BODY_COILS = 3

/** Free length inside the usual hooks of the form, mm. */
export function usualFreeLengthMm(model: ExtensionModel, meanDiameterMm: number, bodyCoils: number): number {
  return bodyLengthMm(bodyCoils, model.wireDiameterMm) + 2 * hookLengthMm(model.hookForm, meanDiameterMm, model.wireDiameterMm)
}

/** G d^4/8 of the wire, N mm^2: the rate times D^3 and the active coils. */
export function stiffness(model: ExtensionModel): number {
  const d = model.wireDiameterMm
  return (model.shearModulusMpa * d * d * d * d) / 8
}

/** Fills the state with the spring of mean diameter D and body coils: its hooks usual, its tension as the first load leaves it, or in the middle of the sensible range without a load. */
export function fillExtension(model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, meanDiameterMm: number, bodyCoils: number): ExtensionState {
  const d = model.wireDiameterMm
  const D = meanDiameterMm
  const activeCoils = bodyCoils + model.hookCoils
  const freeLengthMm = usualFreeLengthMm(model, D, bodyCoils)
  const rate = stiffness(model) / (D * D * D * activeCoils)
  const initialTensionN = Number.isNaN(travel.forceN)
    ? forceAtStressN(usualInitialStressMpa(D / d), D, d)
    : firstForceN(travel, rate) - rate * (travel.lengthMm - freeLengthMm)
  return fillExtensionState(state, model, D, bodyCoils, activeCoils, freeLengthMm, initialTensionN)
}

/*
 * The body coils that a request leaves at a mean diameter lie between two numbers, and both fall as D rises (S = G d^4/(8 D^3)
 * falls, the hooks H and with them 2 H grow):
 * - a rate R, off by t at most: Nb = S/R' - G/E with R' from R (1 - t) to R (1 + t);
 * - a free length L0, off by u at most: Nb = (L0' - 2 H)/d - 1 with L0' from L0 (1 - u) to L0 (1 + u);
 * - one load F at L alone: the tension F - S (L - d - 2 H - Nb d)/(Nb + G/E) is T where
 *   Nb = (S (L - d - 2 H) - (F - T) G/E)/(F - T + S d),
 *   which rises with S and T. It lies between nought and the greatest that is sensible, which falls with D; and the spring is
 *   no longer than L.
 */

// Body coils at which one load leaves the tension T; Infinity where any number leaves less.
function coilsOfTension(model: ExtensionModel, travel: ExtensionTravel, D: number, tensionN: number): number {
  const d = model.wireDiameterMm
  const S = stiffness(model) / (D * D * D)
  const pull = travel.forceN - tensionN
  if (pull <= 0) return Infinity
  return (S * (travel.lengthMm - d - 2 * hookLengthMm(model.hookForm, D, d)) - pull * model.hookCoils) / (pull + S * d)
}

/** Body coils of a rate at a mean diameter. */
export const coilsOfRate = (model: ExtensionModel, D: number, rateNPerMm: number): number => stiffness(model) / (D * D * D * rateNPerMm) - model.hookCoils
/** Body coils of a free length at a mean diameter. */
export const coilsOfLength = (model: ExtensionModel, D: number, lengthMm: number): number =>
  (lengthMm - 2 * hookLengthMm(model.hookForm, D, model.wireDiameterMm)) / model.wireDiameterMm - 1

/** Fewest body coils that a request leaves at a mean diameter, never under three; falls as D rises. */
export function fewestBodyCoils(model: ExtensionModel, travel: ExtensionTravel, D: number): number {
  switch (travel.kind) {
    case 'rate': return Math.max(LEAST_BODY_COILS, coilsOfRate(model, D, travel.rateNPerMm * (1 + travel.rateTolerance)))
    case 'free-length': return Math.max(LEAST_BODY_COILS, coilsOfLength(model, D, travel.freeLengthMm * (1 - travel.lengthTolerance)))
    case 'one-load': return Math.max(LEAST_BODY_COILS, coilsOfTension(model, travel, D, 0))
    case 'rate-and-length': return Math.max(
      LEAST_BODY_COILS, coilsOfRate(model, D, travel.rateNPerMm * (1 + travel.rateTolerance)), coilsOfLength(model, D, travel.freeLengthMm * (1 - travel.lengthTolerance)),
    )
  }
}

/** Most body coils that a request leaves at a mean diameter; falls as D rises. */
export function mostBodyCoils(model: ExtensionModel, travel: ExtensionTravel, D: number): number {
  const d = model.wireDiameterMm
  switch (travel.kind) {
    case 'rate': return coilsOfRate(model, D, travel.rateNPerMm * (1 - travel.rateTolerance))
    case 'free-length': return coilsOfLength(model, D, travel.freeLengthMm * (1 + travel.lengthTolerance))
    case 'one-load': return Math.min(
      coilsOfLength(model, D, travel.lengthMm), coilsOfTension(model, travel, D, forceAtStressN(greatestInitialStressMpa(D / d), D, d)),
    )
    case 'rate-and-length': return Math.min(
      coilsOfRate(model, D, travel.rateNPerMm * (1 - travel.rateTolerance)), coilsOfLength(model, D, travel.freeLengthMm * (1 + travel.lengthTolerance)),
    )
  }
}

/** Body coils that make rate or free length exact; of one load alone the fewest, whose spring is the lightest of its diameter. */
export function exactBodyCoils(model: ExtensionModel, travel: ExtensionTravel, D: number): number {
  switch (travel.kind) {
    case 'rate': case 'rate-and-length': return coilsOfRate(model, D, travel.rateNPerMm)
    case 'free-length': return coilsOfLength(model, D, travel.freeLengthMm)
    case 'one-load': return fewestBodyCoils(model, travel, D)
  }
}
