import type { CompressionSizeRequest } from '#shared/spring'
import { createDice } from '../wires'
import { pickThickness, wiresAround, type Trial } from './trial'

/** What a random compression spring does, with two loads or one; often met, sometimes just not. */
export function makeCompressionTrial(seed: number): Trial {
  const dice = createDice(seed)
  const d = pickThickness(dice)
  const w = dice.between(4.5, 15)
  const n = dice.between(2.5, 15)
  const rate = (80_000 * d) / (8 * w ** 3 * n)
  const lengthMm = (n + 2.5) * d * dice.between(1.2, 2)
  const forceN = (dice.between(150, 700) * Math.PI * d * d) / (8 * w)
  const share = dice.between(0.1, 0.8)
  const first = { lengthMm: lengthMm + (forceN * (1 - share)) / rate, forceN: forceN * share }
  const points = dice.between(0, 1) < 0.6 ? [first, { lengthMm, forceN }] : [{ lengthMm, forceN }]
  const request: CompressionSizeRequest = {
    kind: 'compression', points, limit: 1,
    ends: dice.pick(['closed-ground', 'closed']), method: dice.pick(['en13906', 'wahl']), toleranceGrade: dice.pick([1, 2, 3]), seatingCoefficient: dice.pick([0.5, 0.707, 1]),
    guided: dice.pick([true, false]), solidSafe: dice.pick([true, true, false]), shotPeened: dice.pick([true, false]), duty: { cycles: dice.pick([1e3, 5e4, 1e6]) },
    fit: {
      boreMm: dice.sometimes(0.5, (w + 1) * d * dice.between(0.8, 1.6)), rodMm: dice.sometimes(0.4, (w - 1) * d * dice.between(0.4, 0.95)),
      maxSolidLengthMm: dice.sometimes(0.3, (n + 2) * d * dice.between(0.9, 1.5)), maxFreeLengthMm: dice.sometimes(0.3, (lengthMm + forceN / rate) * dice.between(0.95, 1.5)),
    },
  }
  const { ends, seatingCoefficient, guided, solidSafe, shotPeened } = request
  return {
    request, ...wiresAround(d),
    asked: { lengths: points.map(point => point.lengthMm), forces: points.map(point => point.forceN), ends, seating: seatingCoefficient, guided, solidSafe, peened: shotPeened },
  }
}
