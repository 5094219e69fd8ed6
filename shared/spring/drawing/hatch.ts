import { lineV, path, px, type Box, type PathShape, type Shape } from './shapes'

/** Lines at 45 degrees through a box, rising to the right, `spacingPx` apart across themselves, cut at its sides. */
export function hatchBox({ xPx, yPx, widthPx, heightPx }: Box, spacingPx = 7): PathShape {
  const step = spacingPx * Math.SQRT2
  let d = ''
  // Each line is x + y = constant; the first constants lie on one grid, so that neighbouring boxes match
  for (let sum = Math.ceil((xPx + yPx) / step) * step; sum < xPx + widthPx + yPx + heightPx; sum += step) {
    const x1 = Math.max(xPx, sum - yPx - heightPx)
    const x2 = Math.min(xPx + widthPx, sum - yPx)
    if (x2 - x1 > 0.5) d += `M${px(x1)} ${px(sum - x1)}L${px(x2)} ${px(sum - x2)}`
  }
  return path('hatch', d)
}

/** The fixed plate: an ink line with short hatching on its left. */
export function fixedPlate(xPx: number, y1Px: number, y2Px: number): Shape[] {
  let d = ''
  for (let y = y1Px; y <= y2Px - 2; y += 8) d += `M${px(xPx)} ${px(y)}l-9 9`
  return [path('hatch', d), lineV('plate', xPx, y1Px, y2Px + 4)]
}
