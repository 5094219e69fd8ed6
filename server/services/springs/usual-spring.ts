import { leastInitialStressMpa } from '#shared/spring/mechanics/extension/initial-tension'
import { shearStressMpa } from '#shared/spring/mechanics/stress'
import type { SizingCandidate, SpringSizeRequest } from '#shared/spring/sizing/types'
import { isUsualShape, type GatePolicy } from '../../engine/gate'

/** Coils under which the checks ask for care: active ones of compression springs, those of the body else (common practice, no source). */
const EASY_COILS = { compression: 3, extension: 4, torsion: 4 } as const

/**
 * True for a spring that a person need not look at for its shape: index and wire as the gate has them, enough coils, not
 * slender where it is pressed, and wound with an initial tension that can be held where it is pulled.
 */
export function isUsualSpring({ wire, meanDiameterMm, freeLengthMm, activeCoils, totalCoils, initialTensionN }: SizingCandidate, { kind }: Pick<SpringSizeRequest, 'kind'>, policy: GatePolicy): boolean {
  const { wireDiameterMm } = wire
  const springIndex = meanDiameterMm / wireDiameterMm
  // Slenderness is a matter of springs that are pressed.
  if (!isUsualShape({ springIndex, wireDiameterMm, slenderness: kind === 'compression' ? freeLengthMm / meanDiameterMm : 0 }, policy)) return false
  if ((kind === 'compression' ? activeCoils : totalCoils) < EASY_COILS[kind]) return false
  return kind !== 'extension' || shearStressMpa(initialTensionN ?? 0, meanDiameterMm, wireDiameterMm) >= leastInitialStressMpa(springIndex)
}
