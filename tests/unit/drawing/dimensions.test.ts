import { describe, expect, it } from 'vitest'
import { arrow, breakLine, dimensionAcross, dimensionUpright, leader, TIGHT_GAP_PX } from '#shared/spring/drawing/dimensions'
import { fixedPlate, hatchBox } from '#shared/spring/drawing/hatch'
import { niceStep, stepDecimals, ticksTo } from '#shared/spring/drawing/scale'
import { px, symbol, type Shape } from '#shared/spring/drawing/shapes'
import { pathPoints } from './springs'

const arrows = (shapes: readonly Shape[]) => shapes.flatMap((shape) => (shape.kind === 'path' && shape.look === 'dim-arrow' ? [pathPoints(shape.d)] : []))
const texts = (shapes: readonly Shape[]) => shapes.flatMap((shape) => (shape.kind === 'text' ? [shape] : []))
const lines = (shapes: readonly Shape[]) => shapes.flatMap((shape) => (shape.kind === 'path' && shape.look === 'dim-line' ? [pathPoints(shape.d)] : []))

describe('dimension lines', () => {
  it('draws filled arrows 10 px long and 3.4 px wide with the tip at the place', () => {
    const [tip, a, b] = pathPoints(arrow(100, 50, 1, 0).d)
    expect(tip).toEqual({ x: 100, y: 50 })
    expect([a?.x, b?.x]).toEqual([90, 90])
    expect(Math.abs((a?.y ?? 0) - (b?.y ?? 0))).toBeCloseTo(3.4, 6)
  })

  it('keeps the arrows inside a wide gap and lettering in the middle above the line', () => {
    const shapes = dimensionAcross({ x1Px: 100, x2Px: 300, yPx: 20, partPx: [60, 60], label: symbol('L', '0', ' = 60.0') })
    expect(arrows(shapes).map((points) => [points[0]?.x, points[1]?.x])).toEqual([[100, 110], [300, 290]])
    expect(texts(shapes)[0]).toMatchObject({ xPx: 200, yPx: 15, anchor: 'middle' })
  })

  it('turns the arrows outward under 26 px and moves lettering that does not fit past the right one', () => {
    expect(TIGHT_GAP_PX).toBe(26)
    const shapes = dimensionAcross({ x1Px: 100, x2Px: 125, yPx: 20, partPx: [60, 60], label: '25.6' })
    expect(arrows(shapes).map((points) => [points[0]?.x, points[1]?.x])).toEqual([[100, 90], [125, 135]])
    expect(texts(shapes)[0]?.anchor).toBe('start')
    expect(texts(shapes)[0]?.xPx).toBeGreaterThan(135)
  })

  it('begins extension lines 2 px off the part and ends them 5 px past the arrow, above and below it', () => {
    const above = lines(dimensionAcross({ x1Px: 100, x2Px: 300, yPx: 20, partPx: [60, 60], label: '' }))
    expect(above[0]).toEqual([{ x: 100, y: 58 }, { x: 100, y: 15 }])
    const below = lines(dimensionAcross({ x1Px: 100, x2Px: 300, yPx: 90, partPx: [null, 60], label: '' }))
    expect(below[0]).toEqual([{ x: 300, y: 62 }, { x: 300, y: 95 }])
  })

  it('reads upright dimensions from the right, left of their line', () => {
    const shapes = dimensionUpright({ y1Px: 40, y2Px: 140, xPx: 20, partPx: [60, 60], label: '22.5' })
    expect(texts(shapes)[0]).toMatchObject({ upright: true, xPx: 15, yPx: 90 })
    expect(arrows(shapes).map((points) => [points[0]?.y, points[1]?.y])).toEqual([[40, 50], [140, 130]])
    expect(lines(shapes)[0]).toEqual([{ x: 58, y: 40 }, { x: 15, y: 40 }])
  })

  it('points a leader at the part', () => {
    const shapes = leader({ fromPx: [100, 100], elbowPx: [130, 140], label: 'wire' })
    const [tip, a, b] = arrows(shapes)[0] ?? []
    expect(tip).toEqual({ x: 100, y: 100 })
    // the back of the arrow lies on the leader: 3-4-5 triangle, 10 px back
    expect([((a?.x ?? 0) + (b?.x ?? 0)) / 2, ((a?.y ?? 0) + (b?.y ?? 0)) / 2]).toEqual([106, 108])
  })

  it('breaks a tall part with two zigzags and a low one with one, and ends where it should', () => {
    const tall = pathPoints(breakLine(50, 10, 130).d)
    const low = pathPoints(breakLine(50, 10, 50).d)
    expect([tall.length, low.length]).toEqual([10, 6])
    expect([tall.at(-1), low.at(-1)]).toEqual([{ x: 50, y: 130 }, { x: 50, y: 50 }])
  })
})

describe('hatching', () => {
  it('fills a box with lines at 45 degrees that end at its sides, 7 px apart', () => {
    const box = { xPx: 90, yPx: 280, widthPx: 170, heightPx: 200 }
    const points = pathPoints(hatchBox(box).d)
    expect(points.length / 2).toBeGreaterThan((box.widthPx + box.heightPx) / (7 * Math.SQRT2) - 3)
    for (const { x, y } of points) {
      expect(x >= 90 - 0.01 && x <= 260.01 && y >= 280 - 0.01 && y <= 480.01).toBe(true)
      const onSide = [x - 90, x - 260, y - 280, y - 480].some((gap) => Math.abs(gap) < 0.02)
      expect(onSide).toBe(true)
    }
    for (let i = 0; i < points.length; i += 2) {
      const [a, b] = [points[i], points[i + 1]]
      expect((a?.y ?? 0) - (b?.y ?? 0)).toBeCloseTo((b?.x ?? 0) - (a?.x ?? 0), 1)
    }
  })

  it('draws nothing in an empty box', () => {
    expect(hatchBox({ xPx: 0, yPx: 0, widthPx: 0, heightPx: 100 }).d).toBe('')
  })

  it('hatches the fixed plate on its left', () => {
    const [hatch] = fixedPlate(100, 0, 40)
    expect(hatch?.kind === 'path' && hatch.d).toMatch(/^(M100 \d+l-9 9){5}$/)
  })
})

describe('scales', () => {
  it('rounds up to 1, 2 or 5 times a power of ten', () => {
    expect([43.1, 6.7, 10, 10.2, 0.13, 0.02, 99].map(niceStep)).toEqual([50, 10, 10, 20, 0.2, 0.02, 100])
    expect([0, -1, Number.NaN, Infinity].map(niceStep)).toEqual([1, 1, 1, 1])
  })

  it('knows the places that a step needs', () => {
    expect([50, 1, 0.5, 0.02, 0.001].map(stepDecimals)).toEqual([0, 0, 1, 2, 3])
  })

  it('ticks without drift up to the last', () => {
    expect(ticksTo(0.3, 0.1)).toHaveLength(4)
    expect(ticksTo(60, 10)).toEqual([0, 10, 20, 30, 40, 50, 60])
    expect(ticksTo(59.9, 10)).toHaveLength(6)
  })

  it('writes coordinates to a hundredth', () => {
    expect([1 / 3, 2, -0.001].map(px)).toEqual(['0.33', '2', '0'])
  })
})
