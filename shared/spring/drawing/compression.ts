import { centreLine, hasFaces, type DrawnSpring } from './drawn-spring'
import { halfCoils, type Placement } from './half-coils'
import { lineH, lineV, px, type PathShape, type Shape } from './shapes'
import { crownShapes, wireShapes } from './wire'

const TAU = 2 * Math.PI

/** Above this the end of the wire is seen across the strand, below it end-on. */
const SEEN_ACROSS = 0.4

/**
 * The ground face of one end, seen on edge: from the lowest to the highest point of the chords that it cuts out of the
 * wire, as heights above the axis in mm. Null if it cuts nothing.
 */
export function faceChordMm(spring: DrawnSpring, lengthMm: number, end: 'left' | 'right'): { lowMm: number, highMm: number } | null {
  const wireRadius = spring.wireDiameterMm / 2
  const centre = centreLine(spring, lengthMm)
  let lowMm = Infinity
  let highMm = -Infinity
  for (let fromTip = 0; fromTip <= Math.min(1, spring.totalCoils / 2); fromTip += 0.01) {
    const turns = end === 'left' ? fromTip : spring.totalCoils - fromTip
    const insideMm = end === 'left' ? centre(turns) : lengthMm - centre(turns)
    if (insideMm >= wireRadius) break
    const halfChord = Math.sqrt(wireRadius * wireRadius - insideMm * insideMm)
    for (const radius of [spring.meanDiameterMm / 2 - halfChord, spring.meanDiameterMm / 2 + halfChord]) {
      const heightMm = radius * Math.cos(TAU * turns)
      lowMm = Math.min(lowMm, heightMm)
      highMm = Math.max(highMm, heightMm)
    }
  }
  return highMm > lowMm ? { lowMm, highMm } : null
}

/** A compression spring in side view at `lengthMm`: far strands, near strands over them, crowns, ends of the wire, ground faces. */
export function compressionShapes(spring: DrawnSpring, lengthMm: number, place: Placement): Shape[] {
  const { wireDiameterMm, meanDiameterMm, totalCoils } = spring
  const { pxPerMm, x0Px, axisYPx } = place
  const centre = centreLine(spring, lengthMm)
  const strands = halfCoils({ centre, meanDiameterMm, fromTurn: 0, toTurn: totalCoils, hand: spring.hand }, place)
  const wirePx = wireDiameterMm * pxPerMm

  const tipAt = (turns: number): readonly [xPx: number, yPx: number] =>
    [x0Px + pxPerMm * centre(turns), axisYPx - pxPerMm * meanDiameterMm / 2 * Math.cos(TAU * turns)]
  const isAcross = (turns: number): boolean => Math.abs(Math.sin(TAU * turns)) > SEEN_ACROSS
  const ball = ([xPx, yPx]: readonly [number, number]) => `M${px(xPx)} ${px(yPx)}h0`
  const cut = ([xPx, yPx]: readonly [number, number]) => lineH('w-cut', xPx - wirePx / 2, xPx + wirePx / 2, yPx)
  const startIsNear = spring.hand === 'right'
  const endIsNear = (Math.floor(totalCoils * 2 - 1e-9) % 2 === 0) === startIsNear
  const nearTips = [...(startIsNear ? [0] : []), ...(endIsNear ? [totalCoils] : [])]
  const farBalls = [0, totalCoils].filter((turns) => !nearTips.includes(turns) && !isAcross(turns)).map((turns) => ball(tipAt(turns))).join('')
  const nearBalls = nearTips.filter((turns) => !isAcross(turns)).map((turns) => ball(tipAt(turns))).join('')

  const shapes: Shape[] = [
    ...wireShapes(farBalls, wirePx, false, true),
    ...wireShapes(strands.far, wirePx, false),
    ...crownShapes(farBalls, wirePx, false),
    ...wireShapes(nearBalls, wirePx, true, true),
    ...wireShapes(strands.near, wirePx, true),
    ...crownShapes(strands.crowns, wirePx, true),
    ...nearTips.filter(isAcross).map((turns) => cut(tipAt(turns))),
  ]
  if (!hasFaces(spring)) return shapes

  const halfHeightPx = (meanDiameterMm + wireDiameterMm) * pxPerMm
  const box = { xPx: x0Px - 0.5, yPx: axisYPx - halfHeightPx, widthPx: pxPerMm * lengthMm + 1, heightPx: 2 * halfHeightPx }
  const face = (end: 'left' | 'right'): PathShape[] => {
    const chord = faceChordMm(spring, lengthMm, end)
    return chord ? [lineV('w-face', x0Px + (end === 'left' ? 0 : pxPerMm * lengthMm), axisYPx - pxPerMm * chord.highMm, axisYPx - pxPerMm * chord.lowMm)] : []
  }
  return [{ kind: 'clip', box, shapes }, ...face('left'), ...face('right')]
}
