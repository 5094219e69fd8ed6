import { path, type PathShape } from './shapes'

/** Width of the outline of a near strand: 1.6 px, finer for thin wire. Far strands take a little over half. */
export const edgePx = (wirePx: number): number => (wirePx > 9 ? 1.6 : wirePx > 3 ? 1.2 : 0.9)

/**
 * Wire along a centre line: the outline stroked first, the body over it. A tube's outline is the union of its spheres, so
 * a stroke as wide as the wire is exact. Zero-length pieces with round caps are balls.
 */
export function wireShapes(d: string, wirePx: number, near: boolean, round = false): PathShape[] {
  if (!d) return []
  const line = edgePx(wirePx) * (near ? 1 : 0.55)
  const look = (near ? ' near' : ' far') + (round ? ' round' : '')
  return [path('w-edge' + look, d, wirePx + line), path('w-body' + look, d, Math.max(0.6, wirePx - line))]
}

/** Balls in the body's colour that hide the upright cuts where the strand passes from one side to the other. */
export function crownShapes(d: string, wirePx: number, near: boolean): PathShape[] {
  if (!d) return []
  return [path(`w-body ${near ? 'near' : 'far'} round`, d, Math.max(0.5, wirePx - edgePx(wirePx) * (near ? 1 : 0.55) - 0.1))]
}
