import type { TorsionSizeRequest } from '#shared/spring'
import { createDice } from '../wires'
import { pickThickness, wiresAround, type Trial } from './trial'

/** What a random torsion spring does: two moments at two angles, or one from free. */
export function makeTorsionTrial(seed: number): Trial {
  const dice = createDice(seed)
  const d = pickThickness(dice)
  const w = dice.between(4.5, 14)
  const coils = dice.between(3.5, 20)
  const legs = [dice.between(2, 15) * w * d * 0.3, dice.between(2, 15) * w * d * 0.3] as const
  const active = coils + (legs[0] + legs[1]) / (3 * Math.PI * w * d)
  const rate = (200_000 * d ** 3) / (3667 * w * active)
  const momentNmm = (dice.between(200, 1000) * Math.PI * d ** 3) / 32
  const share = dice.between(0.1, 0.8)
  const at = (m: number, from = 0) => ({ angleDeg: from + m / rate, momentNmm: m })
  const from = dice.between(0, 60)
  const points = dice.between(0, 1) < 0.6 ? [at(momentNmm * share, from), at(momentNmm, from)] : [at(momentNmm)]
  const request: TorsionSizeRequest = {
    kind: 'torsion', points, limit: 1, legs: legs.map(lengthMm => ({ lengthMm, form: 'tangential' as const })), loadOpens: dice.pick([false, false, true]),
    method: dice.pick(['en13906', 'wahl']), toleranceGrade: dice.pick([1, 2, 3]), duty: { cycles: dice.pick([1e3, 5e4, 1e6]) },
    fit: {
      boreMm: dice.sometimes(0.4, (w + 1) * d * dice.between(0.85, 1.6)), rodMm: dice.sometimes(0.4, (w - 1) * d * dice.between(0.4, 0.95)),
      maxFreeLengthMm: dice.sometimes(0.3, (coils + 1) * d * dice.between(0.9, 1.5)),
    },
  }
  return {
    request, ...wiresAround(d),
    asked: { moments: points.map(point => point.momentNmm), angles: points.map(point => point.angleDeg), legs, opens: request.loadOpens },
  }
}
