import type { MomentPoint, TorsionSizeRequest } from '../types'

/** The rate that a request fixes, and where its points lie from free. */
export interface TorsionTravel {
  readonly rateNmmPerDeg: number
  readonly points: readonly MomentPoint[]
  /**
   * Angles of the points from free, degrees, for a rate that steps may have moved off the asked one, and the relative error of
   * the asked moments (of the rate, with one moment) that comes with it. Between two points the error is shared out evenly.
   */
  readonly anglesAt: (rateNmmPerDeg: number) => { readonly angles: readonly number[], readonly error: number }
}

/** The rate that a request fixes. Throws for a request that was not checked. */
export function resolveTorsionTravel({ points, rateNmmPerDeg }: TorsionSizeRequest): TorsionTravel {
  const [first, second] = points
  if (!first) throw new Error('A size request for a torsion spring needs a moment')
  if (!second) {
    const asked = rateNmmPerDeg ?? first.momentNmm / first.angleDeg
    return {
      rateNmmPerDeg: asked,
      points,
      anglesAt: rate => ({ angles: [rateNmmPerDeg === undefined ? first.angleDeg : first.momentNmm / rate], error: Math.abs(rate / asked - 1) }),
    }
  }
  const turn = second.angleDeg - first.angleDeg
  const more = second.momentNmm - first.momentNmm
  return {
    rateNmmPerDeg: more / turn,
    points,
    anglesAt: (rate) => {
      const error = (rate * turn - more) / (first.momentNmm + second.momentNmm)
      const least = (first.momentNmm * (1 - error)) / rate
      return { angles: [least, least + turn], error: Math.abs(error) }
    },
  }
}
