import { fromSi, toSi, type UnitSystem } from '../../units/convert'
import type { LoadCharted } from './load-chart'
import { niceStep } from './scale'

/** The places a slider stops at, counted up from the solid length; the last is the free length. */
export interface PressSteps {
  readonly last: number
  readonly lengthMmAt: (index: number) => number
  readonly indexOf: (lengthMm: number) => number
}

const FINE_STOPS = 350
/** With reduced motion the spring steps visibly instead of gliding. */
const COARSE_STOPS = 20

/** Stops at round lengths of the unit shown, measured down from the free length: 0.1 mm on a stroke of 34 mm. */
export function pressSteps({ solidLengthMm, freeLengthMm }: Pick<LoadCharted, 'solidLengthMm' | 'freeLengthMm'>, units: UnitSystem, isCoarse = false): PressSteps {
  const strokeMm = freeLengthMm - solidLengthMm
  const stepMm = toSi(niceStep(fromSi(strokeMm, 'length', units) / (isCoarse ? COARSE_STOPS : FINE_STOPS)), 'length', units)
  const last = Math.max(1, Math.ceil(strokeMm / stepMm - 1e-9))
  return {
    last,
    lengthMmAt: (index) => Math.min(freeLengthMm, Math.max(solidLengthMm, freeLengthMm - (last - index) * stepMm)),
    indexOf: (lengthMm) => Math.min(last, Math.max(0, last - Math.round((freeLengthMm - lengthMm) / stepMm))),
  }
}
