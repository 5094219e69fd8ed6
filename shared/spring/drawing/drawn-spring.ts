import type { CoilHand, CompressionEnds } from '../codes'
import { solidLengthMm } from '../mechanics/compression/end-geometry'

/** What has to be known of a compression spring to draw it to scale. */
export interface DrawnSpring {
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly activeCoils: number
  readonly totalCoils: number
  readonly freeLengthMm: number
  readonly ends: CompressionEnds
  readonly hand: CoilHand
}

/** True if every size is a positive number and the coils can lie within the outline: only such a spring is drawn. */
export function isDrawable(spring: DrawnSpring): boolean {
  const { wireDiameterMm: d, meanDiameterMm: D, activeCoils: n, totalCoils: nt, freeLengthMm: L0 } = spring
  return [d, D, n, nt, L0].every((size) => Number.isFinite(size) && size > 0) && D > d && nt >= n && nt <= 500 && L0 >= drawnSolidLengthMm(spring) * (1 - 1e-9)
}

const isGround = (ends: CompressionEnds): boolean => ends === 'closed-ground' || ends === 'open-ground'

/** Length at which the drawn coils touch: that of the textbooks, since the drawing has the nominal wire. */
export const drawnSolidLengthMm = ({ wireDiameterMm, totalCoils, ends }: DrawnSpring): number => solidLengthMm('textbook', ends, totalCoils, wireDiameterMm)

/** Turns of each end that lie closed. */
function closedTurns({ activeCoils, totalCoils, ends }: DrawnSpring): number {
  const turns = (totalCoils - activeCoils) / 2
  return ends.startsWith('open') || turns < 0.05 ? 0 : turns
}

/** Pitch of the open coils when the spring is `lengthMm` long; unlike the mechanics' it holds for a loaded spring and for any count of end coils. */
export function drawnPitchMm(spring: DrawnSpring, lengthMm: number): number {
  const closed = closedTurns(spring)
  return (lengthMm - 2 * closed * spring.wireDiameterMm - (isGround(spring.ends) ? 0 : spring.wireDiameterMm)) / (spring.totalCoils - 2 * closed)
}

/** Place along the axis, in mm from the left face, of the wire's centre after so many turns. */
export type CentreLine = (turns: number) => number

/** Cubic from (0, a) with slope m to (1, b) with slope `slope`, at u; slopes are per unit of u. Steeper than three rises it would dip. */
function blend(u: number, a: number, m: number, b: number, slope: number): number {
  const s = Math.min(slope, 3 * (b - a))
  const u2 = u * u
  const u3 = u2 * u
  return a + (b - a) * (3 * u2 - 2 * u3) + m * (u3 - 2 * u2 + u) + s * (u3 - u2)
}

/**
 * The centre line of the wire at `lengthMm`. A ground tip lies in the face, half a wire thick: its centre rises d/2 over
 * 3/4 turn (so 270 degrees are ground) and one wire after one turn, where it touches the tip. An unground closed end
 * starts half a wire inside and rises one wire a turn. Open ends keep the pitch to the tip. End coils keep their shape under load.
 */
export function centreLine(spring: DrawnSpring, lengthMm: number): CentreLine {
  const { wireDiameterMm: d, totalCoils } = spring
  const ground = isGround(spring.ends)
  const pitch = drawnPitchMm(spring, lengthMm)
  const closed = closedTurns(spring)
  const tipMm = ground ? 0 : d / 2
  // An end that is not about one turn long is the one-turn profile drawn out or shortened; a longer one goes on turn by turn
  const stretch = closed < 1.25 ? closed : 1
  const tipRise = ground ? d / 1.5 : d

  const end = (turns: number): number => {
    const u = turns / stretch
    if (u <= 0.75) return tipMm + tipRise * turns
    const last = 0.25 * stretch
    if (u <= 1) return blend((u - 0.75) / 0.25, tipMm + tipRise * 0.75 * stretch, tipRise * last, tipMm + d * stretch, (closed > stretch ? d : pitch) * last)
    if (turns <= closed - 0.25) return tipMm + d * turns
    return blend((turns - closed + 0.25) / 0.25, tipMm + d * (closed - 0.25), d * 0.25, tipMm + d * closed, pitch * 0.25)
  }
  return (turns) => {
    if (turns < closed) return end(turns)
    if (turns > totalCoils - closed) return lengthMm - end(totalCoils - turns)
    return tipMm + d * closed + pitch * (turns - closed)
  }
}

/** True where the ends have a flat face to be seen. */
export const hasFaces = (spring: DrawnSpring): boolean => isGround(spring.ends)
