import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { dimensionAngle } from '#shared/spring/drawing/angle-dimension'
import { figureOf } from '#shared/spring/drawing/figure-of'
import { legCorner } from '#shared/spring/drawing/leg-corner'
import { fixedLegMm, freeAngleDeg, legAngleAt, loadedLegMm, meanDiameterAtMm, turnSense } from '#shared/spring/drawing/legs'
import { layoutMotion, type Motion } from '#shared/spring/drawing/motion'
import { drawnTorsion, type MovedTorsion } from '#shared/spring/drawing/moved'
import { torsionEndShapes, torsionSideShapes } from '#shared/spring/drawing/torsion'
import { anyPulledOrTurned, flatten, partsOutside, pathPoints, placesOf, torsionDesign, wordsThatMeet } from './springs'

const WIDTHS = [280, 360, 540, 1000] as const
const motionOf = (design: MovedTorsion, options: Partial<Parameters<typeof layoutMotion>[1]> = {}): Motion => {
  const motion = layoutMotion(design, { widthPx: 540, units: 'metric', ...options })
  if (!motion) throw new Error('It must be drawn')
  return motion
}
const everything = (motion: Motion, at: number) => {
  const { under, over } = motion.moving(at)
  return [...under, ...motion.still, ...over]
}
const straight = [{ lengthMm: 30, form: 'straight' }, { lengthMm: 20, form: 'straight' }] as const
const VARIANTS: Readonly<Record<string, MovedTorsion>> = {
  'tangential legs': torsionDesign(),
  'legs along the axis': torsionDesign({ legs: straight }),
  'left-hand': torsionDesign({ hand: 'left' }),
  'opened': torsionDesign({ loadOpens: true, bodyCoils: 4.6, legs: [{ lengthMm: 12, form: 'tangential' }, { lengthMm: 60, form: 'tangential' }] }),
  'legs in one line': torsionDesign({ bodyCoils: 5 }),
  'parallel legs': torsionDesign({ bodyCoils: 5.5, legs: [{ lengthMm: 40, form: 'tangential' }, { lengthMm: 25, form: 'tangential' }] }),
  'crossing legs': torsionDesign({ bodyCoils: 6.75 }),
  'no legs': torsionDesign({ legs: [], bodyCoils: 12 }),
}

describe('a torsion spring seen from its end', () => {
  it('shrinks as D Nb/(Nb + turns) and turns its leg by the angle', () => {
    const drawn = drawnTorsion(torsionDesign())
    expect(meanDiameterAtMm(drawn, 90)).toBeCloseTo((16 * 5.25) / (5.25 + 0.25 * drawn.bodyShare), 9)
    const direction = (angle: number) => {
      const { fromX, fromY, toX, toY } = loadedLegMm(drawn, angle, 30)
      return Math.atan2(toY - fromY, toX - fromX)
    }
    const turned = ((direction(0) - direction(40)) * 180) / Math.PI
    expect((turned + 360) % 360).toBeCloseTo(40, 9)
  })

  it('has legs that leave the ring as tangents, as long as they are', () => {
    for (const hand of ['right', 'left'] as const) {
      const drawn = drawnTorsion(torsionDesign({ hand }))
      for (const angle of [0, 33, 90]) {
        for (const { fromX, fromY, toX, toY } of [loadedLegMm(drawn, angle, 30), fixedLegMm(drawn, angle, 30)]) {
          expect(fromX * (toX - fromX) + fromY * (toY - fromY)).toBeCloseTo(0, 9)
          expect(Math.hypot(toX - fromX, toY - fromY)).toBeCloseTo(30, 9)
          expect(Math.hypot(fromX, fromY)).toBeCloseTo(meanDiameterAtMm(drawn, angle) / 2, 9)
        }
      }
    }
  })

  it('draws ring and legs where those places are, the fixed leg behind and the loaded one in front', () => {
    const drawn = drawnTorsion(torsionDesign())
    const place = { pxPerMm: 5, xPx: 200, yPx: 150 }
    const edges = torsionEndShapes(drawn, 90, place).flatMap(shape => (shape.kind === 'path' && shape.look.startsWith('w-edge') ? [shape] : []))
    expect(edges.map(({ look }) => look)).toEqual(['w-edge far', 'w-edge near', 'w-edge near'])
    const [fixed, ring, loaded] = edges
    const radius = (meanDiameterAtMm(drawn, 90) / 2) * 5
    expect(/A([\d.]+)/.exec(ring?.d ?? '')?.[1]).toBe(String(Math.round(radius * 100) / 100))
    expect(pathPoints(fixed?.d ?? '').at(-1)).toEqual({ x: 50, y: Number((150 + radius).toFixed(2)) })
    // Nb = 5.25 and a quarter turn more: the loaded leg points to the left, from the top of the ring
    const tip = pathPoints(loaded?.d ?? '').at(-1)
    expect(tip?.x).toBeCloseTo(50, 1)
    expect(tip?.y).toBeCloseTo(150 - radius, 1)
  })

  it('shows a leg along the axis end-on, in front alone, and cuts every other', () => {
    const place = { pxPerMm: 5, xPx: 200, yPx: 150 }
    const along = flatten(torsionEndShapes(drawnTorsion(torsionDesign({ legs: straight })), 0, place))
    expect(along.filter(shape => shape.look === 'w-edge near round')).toHaveLength(1)
    expect(along.filter(shape => shape.look === 'w-cut')).toHaveLength(0)
    expect(flatten(torsionEndShapes(drawnTorsion(torsionDesign()), 0, place)).filter(shape => shape.look === 'w-cut')).toHaveLength(2)
  })

  it('turns left-hand and opened springs the other way', () => {
    const senses = [[false, 'right'], [true, 'right'], [false, 'left'], [true, 'left']] as const
    expect(senses.map(([loadOpens, hand]) => turnSense({ loadOpens, hand }))).toEqual([-1, 1, 1, -1])
    for (const [loadOpens, hand] of senses) {
      const drawn = drawnTorsion(torsionDesign({ loadOpens, hand }))
      const by = legAngleAt(drawn, 5, 30) - legAngleAt(drawn, 0, 30)
      expect(Math.sign(Math.atan2(Math.sin(by), Math.cos(by)))).toBe(turnSense(drawn))
    }
  })
})

describe('the angle between free legs', () => {
  it('follows from the part of a turn that the body has', () => {
    expect([5, 5.25, 5.5, 5.75, 6].map(bodyCoils => freeAngleDeg({ bodyCoils }))).toEqual([180, 90, 0, 90, 180])
  })

  it('is dimensioned where the lines of the legs meet, clear of the ring, between their directions', () => {
    for (const bodyCoils of [4.1, 5.25, 5.35, 6.75, 7.9]) {
      const drawn = drawnTorsion(torsionDesign({ bodyCoils }))
      const corner = legCorner(drawn)
      if (!corner) throw new Error('They must meet')
      const { fromX, fromY, toX, toY } = loadedLegMm(drawn, 0, 30)
      // On both lines
      expect(corner.yMm).toBeCloseTo(8, 9)
      expect((corner.xMm - fromX) * (toY - fromY) - (corner.yMm - fromY) * (toX - fromX)).toBeCloseTo(0, 6)
      expect((Math.abs(corner.turnRad) * 180) / Math.PI).toBeCloseTo(freeAngleDeg(drawn), 9)
      expect(corner.radiusMm).toBeGreaterThan(Math.hypot(corner.xMm, corner.yMm) + 9)
    }
  })

  it('is written in words where the legs lie in one line or beside each other', () => {
    for (const [name, words] of [['legs in one line', 'legs 180.0\u00b0 apart'], ['parallel legs', 'legs 0.0\u00b0 apart']] as const) {
      const design = VARIANTS[name]
      if (!design) throw new Error('Not a variant')
      expect(legCorner(drawnTorsion(design))).toBeNull()
      expect(figureOf(design, { widthPx: 540, units: 'metric' })?.shapes.some(shape => shape.kind === 'text' && shape.runs[0]?.text === words)).toBe(true)
    }
  })

  it('has arrows on the arc that point outward along it, or inward from tails where it is short', () => {
    const wide = dimensionAngle({ xPx: 0, yPx: 0, radiusPx: 100, fromRad: 0, turnRad: Math.PI / 2, label: '90.0\u00b0', betweenPx: [-200, 200] })
    const tips = (shapes: typeof wide) => shapes.flatMap(shape => (shape.kind === 'path' && shape.look === 'dim-arrow' ? [pathPoints(shape.d)] : []))
    const [first, last] = tips(wide)
    expect(first?.[0]).toEqual({ x: 100, y: 0 })
    expect(first?.[1]?.y).toBeGreaterThan(9)
    expect(last?.[0]).toEqual({ x: 0, y: 100 })
    expect(last?.[1]?.x).toBeGreaterThan(9)
    const [tight] = tips(dimensionAngle({ xPx: 0, yPx: 0, radiusPx: 100, fromRad: 0, turnRad: 0.2, label: '11.5\u00b0', betweenPx: [-200, 200] }))
    expect(tight?.[1]?.y).toBeLessThan(-9)
  })
})

describe('a torsion spring in side view', () => {
  it('has a closed body of (Nb + 1) d between the leg that goes up at its left end and the fixed one at its right', () => {
    const drawn = drawnTorsion(torsionDesign())
    const shapes = torsionSideShapes(drawn, { pxPerMm: 10, x0Px: 50, axisYPx: 400 })
    const points = flatten(shapes).flatMap(shape => (shape.kind === 'path' && shape.look.startsWith('w-edge') ? pathPoints(shape.d) : []))
    expect(Math.min(...points.map(({ x }) => x))).toBeCloseTo(50 + 10, 0)
    expect(Math.max(...points.map(({ x }) => x))).toBeCloseTo(50 + 6.25 * 20 - 10, 0)
    // The loaded leg leaves the axis' height upward: 30 mm
    expect(Math.min(...points.map(({ y }) => y))).toBeCloseTo(400 - 300, 0)
    expect(points.filter(({ y }) => y < 400 - 81).every(({ x }) => Math.abs(x - 60) < 1)).toBe(true)
  })

  it('runs its legs along the axis from both ends of the body', () => {
    const drawn = drawnTorsion(torsionDesign({ legs: straight }))
    const points = flatten(torsionSideShapes(drawn, { pxPerMm: 10, x0Px: 500, axisYPx: 400 })).flatMap(shape => (shape.kind === 'path' ? pathPoints(shape.d) : []))
    expect(Math.min(...points.map(({ x }) => x))).toBeCloseTo(500 + 10 - 200, 0)
    expect(Math.max(...points.map(({ x }) => x))).toBeCloseTo(500 + 6.25 * 20 - 10 + 300, 0)
  })
})

describe('a torsion spring that is turned', () => {
  it('reads off what the evaluation says', () => {
    const design = torsionDesign()
    const motion = motionOf(design, { widthPx: 360 })
    expect(motion.reading(90).load.replaceAll('\u202f', ' ')).toBe('895.2 N\u00b7mm')
    expect(motion.reading((design.evaluation.greatestAngleDeg ?? 0) * 1.01).tone).toBe('stop')
    expect(motionOf(design, { widthPx: 360, units: 'inch' }).reading(90).load).toContain('lbf\u00b7in')
    expect(motion.table.rows.map(row => row.name)).toEqual(['Free', 'Moment M1', 'Moment M2', 'Limit of the wire'])
  })

  it('dimensions the turn once there is one, and marks the places of its working points', () => {
    const motion = motionOf(torsionDesign())
    const words = (at: number) => motion.moving(at).under.flatMap(shape => (shape.kind === 'text' ? [shape.runs.map(run => run.text).join('')] : []))
    expect(words(0)).toEqual(['\u03b11', '\u03b12'])
    expect(words(65)).toEqual(['\u03b11', '\u03b12', '65.0\u00b0'])
  })

  it.each(Object.keys(VARIANTS))('keeps figure and chart of one with %s to their box, and no words on each other, at every width', (name) => {
    const design = VARIANTS[name]
    if (!design) throw new Error('Not a variant')
    for (const widthPx of WIDTHS) {
      for (const units of ['metric', 'inch'] as const) {
        const figure = figureOf(design, { widthPx, units })
        if (!figure) throw new Error('It must be drawn')
        expect([widthPx, units, partsOutside(figure, figure.shapes), wordsThatMeet(figure.shapes)]).toEqual([widthPx, units, [], []])
        const motion = motionOf(design, { widthPx, units })
        for (const share of [0, 0.1, 0.33, 0.5, 0.75, 1]) {
          const shapes = everything(motion, share * motion.high)
          expect([widthPx, units, share, partsOutside(motion, shapes), wordsThatMeet(shapes)]).toEqual([widthPx, units, share, [], []])
        }
      }
    }
  })

  it.each(Object.keys(VARIANTS))('has the end view alone in a low and narrow figure of one with %s, and keeps to its box', (name) => {
    const design = VARIANTS[name]
    if (!design) throw new Error('Not a variant')
    const figure = figureOf(design, { widthPx: 280, units: 'inch', tallestPx: 150 })
    if (!figure) throw new Error('It must be drawn')
    expect(figure.sentence).toContain('Torsion spring seen from its end, outside')
    expect(figure.heightPx).toBeLessThan(250)
    expect([partsOutside(figure, figure.shapes), wordsThatMeet(figure.shapes)]).toEqual([[], []])
  })

  it('names itself in one sentence', () => {
    expect(figureOf(torsionDesign(), { widthPx: 540, units: 'metric' })?.sentence.replaceAll('\u202f', ' ')).toBe(
      'Torsion spring in side view and seen from its end, outside diameter 18.0 mm, inside diameter 14.0 mm, wire 2.00 mm, 5.25 coils in the body, legs 30.0 mm and 30.0 mm off the coil, 90.0\u00b0 apart, right-hand.',
    )
  })

  it('redraws in well under 2 ms', () => {
    const motion = motionOf(torsionDesign())
    for (let i = 0; i < 50; i++) motion.moving(i)
    const start = performance.now()
    for (let i = 0; i < 200; i++) motion.moving(i / 2)
    expect((performance.now() - start) / 200).toBeLessThan(2)
  })
})

describe('whatever can be drawn', () => {
  it('has only finite places on its drawing, at any width, and nothing at all for sizes that are no spring', () => {
    let drawn = 0
    fc.assert(fc.property(anyPulledOrTurned, fc.constantFrom(200, 280, 360, 1000), fc.constantFrom('metric' as const, 'inch' as const), (designs, widthPx, units) => {
      for (const design of designs) {
        const motion = layoutMotion(design, { widthPx, units })
        const figure = figureOf(design, { widthPx, units })
        if (!motion || !figure) continue
        drawn++
        for (const shapes of [figure.shapes, ...[motion.low, (motion.low + motion.high) / 2, motion.high].map(at => everything(motion, at))]) expect(placesOf(shapes).every(Number.isFinite)).toBe(true)
        const wires = (shapes: typeof figure.shapes) => shapes.filter(shape => shape.kind === 'path' && shape.look.startsWith('w-'))
        expect(partsOutside(figure, wires(figure.shapes))).toEqual([])
        expect(partsOutside(motion, wires([...motion.moving(motion.high).under]))).toEqual([])
        expect(motion.widthPx).toBeGreaterThanOrEqual(280)
      }
    }), { numRuns: 200, seed: 9 })
    expect(drawn).toBeGreaterThan(150)
  })
})
