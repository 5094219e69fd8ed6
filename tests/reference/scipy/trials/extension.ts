import type { ExtensionSizeRequest } from '#shared/spring'
import { createDice } from '../wires'
import { pickThickness, wiresAround, type Trial } from './trial'

/** What a random extension spring with full loops does: two loads, one, or one and the free length. */
export function makeExtensionTrial(seed: number): Trial {
  const dice = createDice(seed)
  const d = pickThickness(dice)
  const w = dice.between(4.5, 14)
  const coils = dice.between(4, 25)
  const freeLengthMm = (2 * (w - 1) + coils + 1) * d
  const rate = (80_000 * d) / (8 * w ** 3 * (coils + 0.4))
  // Loads from a tenth of the strength or so, with an initial stress from the middle of what winding gives.
  const forceAt = (stressMpa: number) => (stressMpa * Math.PI * d * d) / (8 * w)
  const tensionN = forceAt((231 / Math.exp(0.105 * w)) * dice.between(0.8, 1.1))
  const forceN = tensionN + forceAt(dice.between(100, 450))
  const share = dice.between(0.1, 0.8)
  const at = (f: number) => ({ lengthMm: freeLengthMm + (f - tensionN) / rate, forceN: f })
  const form = dice.between(0, 1)
  const points = form < 0.5 ? [at(tensionN + (forceN - tensionN) * share), at(forceN)] : [at(forceN)]
  const asksFreeLength = form >= 0.75
  const request: ExtensionSizeRequest = {
    kind: 'extension', points, limit: 1, freeLengthMm: asksFreeLength ? freeLengthMm : undefined,
    hook: { form: 'full-loop' }, method: dice.pick(['en13906', 'wahl']), toleranceGrade: dice.pick([1, 2, 3]), duty: { cycles: dice.pick([1e3, 5e4, 1e6]) },
    fit: {
      boreMm: dice.sometimes(0.4, (w + 1) * d * dice.between(0.85, 1.6)), rodMm: dice.sometimes(0.2, (w - 1) * d * dice.between(0.4, 0.95)),
      maxFreeLengthMm: dice.sometimes(asksFreeLength ? 0 : 0.3, freeLengthMm * dice.between(0.9, 1.5)),
    },
  }
  // The springs that hold their tension are few: among fewer wires differential evolution finds them more often.
  return { request, ...wiresAround(d, 1.25), asked: { lengths: points.map(point => point.lengthMm), forces: points.map(point => point.forceN), freeLength: request.freeLengthMm ?? null } }
}
