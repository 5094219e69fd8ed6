import fc from 'fast-check'
import type { DrawnSpring } from '#shared/spring/drawing/drawn-spring'
import type { Shape } from '#shared/spring/drawing/shapes'

/** The demonstration spring: d 2.5, D 20, n 8.25, L0 60, closed and ground. */
export const demoSpring: DrawnSpring = {
  wireDiameterMm: 2.5, meanDiameterMm: 20, activeCoils: 8.25, totalCoils: 10.25, freeLengthMm: 60, ends: 'closed-ground', hand: 'right',
}

const extraCoils = { 'closed-ground': 2, 'closed': 2, 'open': 0, 'open-ground': 1 } as const

/** Springs over the whole range that can be ordered: d 0.07 to 16 mm, index 4 to 20, 2 to 60 coils, gaps up to 8 d. */
export const anySpring: fc.Arbitrary<DrawnSpring> = fc.record({
  wireDiameterMm: fc.double({ min: 0.07, max: 16, noNaN: true }),
  index: fc.double({ min: 4, max: 20, noNaN: true }),
  activeCoils: fc.integer({ min: 8, max: 240 }).map((quarters) => quarters / 4),
  gapShare: fc.double({ min: 0.05, max: 8, noNaN: true }),
  ends: fc.constantFrom('closed-ground', 'closed', 'open', 'open-ground'),
  hand: fc.constantFrom('right', 'left'),
}).map(({ wireDiameterMm, index, activeCoils, gapShare, ends, hand }) => {
  const totalCoils = activeCoils + extraCoils[ends]
  const solid = (totalCoils + (ends.endsWith('ground') ? 0 : 1)) * wireDiameterMm
  return { wireDiameterMm, meanDiameterMm: wireDiameterMm * index, activeCoils, totalCoils, freeLengthMm: solid + gapShare * wireDiameterMm * activeCoils, ends, hand }
})

/** All shapes, those inside clips too. */
export function flatten(shapes: readonly Shape[]): Exclude<Shape, { kind: 'clip' }>[] {
  return shapes.flatMap((shape) => (shape.kind === 'clip' ? flatten(shape.shapes) : [shape]))
}

/** End points of every curve and line of a path of absolute commands; relative short strokes and dots add none. */
export function pathPoints(d: string): { x: number, y: number }[] {
  const points: { x: number, y: number }[] = []
  let x = 0
  let y = 0
  for (const [, command = '', rest = ''] of d.matchAll(/([MLHVCAZlhv])([^MLHVCAZlhv]*)/g)) {
    const numbers = rest.trim().split(/[ ,]+/).filter(Boolean).map(Number)
    if (command === 'H') x = numbers[0] ?? Number.NaN
    else if (command === 'V') y = numbers[0] ?? Number.NaN
    else if ('MLCA'.includes(command)) [x = Number.NaN, y = Number.NaN] = numbers.slice(-2)
    else continue
    points.push({ x, y })
  }
  return points
}
