import { bodyLengthMm, hookLengthMm } from '../../mechanics/extension/hooks'
import type { ExtensionModel } from '../../mechanics/extension/model'
import { fillExtensionState, type ExtensionState } from '../../mechanics/extension/state'
import type { ExtensionSizeRequest, LoadPoint } from '../types'

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

/** What the request fixes. `anchor` is the load the initial tension is counted from. */
export type ExtensionTravel =
  | { readonly kind: 'rate', readonly anchor: LoadPoint, readonly rateNPerMm: number, readonly points: readonly LoadPoint[] }
  | { readonly kind: 'free-length', readonly anchor: LoadPoint, readonly freeLengthMm: number, readonly points: readonly LoadPoint[] }
  | { readonly kind: 'one-load', readonly anchor: LoadPoint, readonly points: readonly LoadPoint[] }

/** What the request fixes. Throws for a request that was not checked. */
export function resolveExtensionTravel({ points, rateNPerMm, freeLengthMm }: ExtensionSizeRequest): ExtensionTravel {
  const [first, second] = points
  if (!first) throw new Error('A size request for an extension spring needs a load')
  if (second) return { kind: 'rate', anchor: first, rateNPerMm: (second.forceN - first.forceN) / (second.lengthMm - first.lengthMm), points }
  if (rateNPerMm !== undefined) return { kind: 'rate', anchor: first, rateNPerMm, points }
  if (freeLengthMm !== undefined) return { kind: 'free-length', anchor: first, freeLengthMm, points }
  return { kind: 'one-load', anchor: first, points }
}

/** Load at the anchor for a rate that steps have moved off the asked one, and the relative error of the asked loads. */
export function steppedAnchorN(travel: ExtensionTravel, rateNPerMm: number): { readonly forceN: number, readonly error: number } {
  const { anchor, points } = travel
  const [first, second] = points
  if (travel.kind !== 'rate') return { forceN: anchor.forceN, error: 0 }
  if (!first || !second) return { forceN: anchor.forceN, error: Math.abs(rateNPerMm / travel.rateNPerMm - 1) }
  const error = (rateNPerMm * (second.lengthMm - first.lengthMm) - (second.forceN - first.forceN)) / (first.forceN + second.forceN)
  return { forceN: first.forceN * (1 - error), error: Math.abs(error) }
}

/** Fills the state with the spring of mean diameter D and body coils that carries the anchor's load, its free length as given or usual. */
export function fillExtension(
  model: ExtensionModel, state: ExtensionState, travel: ExtensionTravel, meanDiameterMm: number, bodyCoils: number, anchorN = travel.anchor.forceN,
): ExtensionState {
  const activeCoils = bodyCoils + model.hookCoils
  const freeLengthMm = usualFreeLengthMm(model, meanDiameterMm, bodyCoils)
  const rate = stiffness(model) / (meanDiameterMm * meanDiameterMm * meanDiameterMm * activeCoils)
  return fillExtensionState(state, model, meanDiameterMm, bodyCoils, activeCoils, freeLengthMm, anchorN - rate * (travel.anchor.lengthMm - freeLengthMm))
}

/** Body coils that a request leaves for a mean diameter where it fixes the rate or the free length. */
export function bodyCoilsAt(model: ExtensionModel, travel: Exclude<ExtensionTravel, { kind: 'one-load' }>, meanDiameterMm: number): number {
  if (travel.kind === 'rate') {
    return stiffness(model) / (meanDiameterMm * meanDiameterMm * meanDiameterMm * travel.rateNPerMm) - model.hookCoils
  }
  return (travel.freeLengthMm - 2 * hookLengthMm(model.hookForm, meanDiameterMm, model.wireDiameterMm)) / model.wireDiameterMm - 1
}
