import { describe, expect, it } from 'vitest'
import { HOOK_FORMS } from '#shared/spring/codes'
import { bodyPitchMm, extensionHooks, extensionShapes } from '#shared/spring/drawing/extension'
import { figureOf } from '#shared/spring/drawing/figure-of'
import { layoutMotion, motionSentence, type Motion } from '#shared/spring/drawing/motion'
import { drawnExtension, type MovedExtension } from '#shared/spring/drawing/moved'
import { extensionDesign, flatten, partsOutside, pathPoints, wordsThatMeet } from './springs'

const WIDTHS = [280, 360, 540, 1000] as const
const place = { pxPerMm: 8, x0Px: 100, axisYPx: 120 }
const motionOf = (design: MovedExtension, options: Partial<Parameters<typeof layoutMotion>[1]> = {}): Motion => {
  const motion = layoutMotion(design, { widthPx: 540, units: 'metric', ...options })
  if (!motion) throw new Error('It must be drawn')
  return motion
}
const everything = (motion: Motion, at: number) => {
  const { under, over } = motion.moving(at)
  return [...under, ...motion.still, ...over]
}

describe('an extension spring as it is drawn', () => {
  it('has its coils closed at rest and opens each by its share of the pull', () => {
    const drawn = drawnExtension(extensionDesign())
    expect(bodyPitchMm(drawn, drawn.freeLengthMm)).toBe(1.6)
    expect(bodyPitchMm(drawn, drawn.freeLengthMm + 10)).toBeCloseTo(1.6 + 10 / 20, 12)
  })

  it('has full loops of the coil\'s own diameter that leave the axis upright, go 333 degrees round and stop short of the body', () => {
    // L0 = 2(D - d) + (Nb + 1) d (Shigley): 2 x 10.4 + 21 x 1.6 = 54.4 mm
    const drawn = drawnExtension(extensionDesign())
    expect(drawn.freeLengthMm).toBeCloseTo(54.4, 9)
    const { left, right } = extensionHooks(drawn, drawn.freeLengthMm, place)
    for (const [hook, farX] of [[left, 100 - 0.8 * 8], [right, 100 + (54.4 + 0.8) * 8]] as const) {
      const [start] = pathPoints(hook.path)
      const radii = /A([\d.]+) ([\d.]+)/.exec(hook.path)?.slice(1).map(Number)
      // The loop's circle touches the body's end strand on the axis: D across, between there and the far side
      expect(radii).toEqual([48, 48])
      expect(start?.y).toBe(120)
      expect(Math.abs((start?.x ?? 0) - farX)).toBeCloseTo(96, 6)
      const middleX = ((start?.x ?? 0) + farX) / 2
      const angle = Math.acos(((hook.endPx[0] - middleX) * ((start?.x ?? 0) - middleX)) / 48 ** 2 + ((hook.endPx[1] - 120) * 0) / 48 ** 2)
      expect((angle * 180) / Math.PI).toBeCloseTo(360 - 333, 6)
    }
  })

  it.each(HOOK_FORMS)('keeps the insides of its %s hooks as far apart as it is long, however it is pulled and wound', (form) => {
    for (const hand of ['right', 'left'] as const) {
      for (const bodyCoils of [3, 6.5, 20, 20.3]) {
        const drawn = drawnExtension(extensionDesign({ hook: { form }, hand, bodyCoils }))
        for (const lengthMm of [drawn.freeLengthMm, drawn.freeLengthMm * 1.4]) {
          const { left, right } = extensionHooks(drawn, lengthMm, place)
          const [leftStart, rightStart] = [pathPoints(left.path)[0]?.x ?? Number.NaN, pathPoints(right.path)[0]?.x ?? Number.NaN]
          // From the wire's centre in the body, half a wire inside the body's face, to the inside of the hook
          expect(leftStart - (drawn.hookLengthMm + 0.8) * 8).toBeCloseTo(100, form === 'extended-hook' ? -1 : 1)
          expect(rightStart + (drawn.hookLengthMm + 0.8) * 8).toBeCloseTo(100 + lengthMm * 8, form === 'extended-hook' ? -1 : 1)
        }
      }
    }
  })

  it.each(HOOK_FORMS)('keeps its %s hooks in shape under load: they only move', (form) => {
    const drawn = drawnExtension(extensionDesign({ hook: { form } }))
    // Without the bend into a shank, which follows the strand
    const shape = (lengthMm: number) => {
      const points = pathPoints(extensionHooks(drawn, lengthMm, place).right.path).slice(form === 'extended-hook' ? 2 : 0)
      return points.map(({ x, y }) => [Math.round((x - (points.at(-1)?.x ?? 0)) * 10), Math.round(y * 10)])
    }
    const [free, pulled] = [shape(drawn.freeLengthMm), shape(drawn.freeLengthMm + 30)]
    expect(free.length).toBeGreaterThan(1)
    pulled.forEach(([x, y], i) => {
      expect(Math.abs((x ?? 0) - (free[i]?.[0] ?? Infinity))).toBeLessThanOrEqual(1)
      expect(y).toBe(free[i]?.[1])
    })
  })

  it.each(HOOK_FORMS)('joins %s hooks to the last strand where it ends', (form) => {
    for (const hand of ['right', 'left'] as const) {
      for (const bodyCoils of [6, 6.5]) {
        const drawn = drawnExtension(extensionDesign({ hook: { form }, hand, bodyCoils }))
        const hooks = extensionHooks(drawn, drawn.freeLengthMm, place)
        const paths = flatten(extensionShapes(drawn, drawn.freeLengthMm, place)).flatMap(shape => (shape.kind === 'path' && shape.look.startsWith('w-edge') ? [shape.d] : []))
        for (const hook of [hooks.left, hooks.right]) {
          const [start] = pathPoints(hook.path)
          const others = paths.filter(d => !d.includes(hook.path)).flatMap(pathPoints)
          const nearest = Math.min(...others.map(({ x, y }) => Math.hypot(x - (start?.x ?? 0), y - (start?.y ?? 0))))
          expect(nearest).toBeLessThan(0.5)
        }
      }
    }
  })

  it('tells the four hook forms apart', () => {
    const drawings = HOOK_FORMS.map((form) => {
      const drawn = drawnExtension(extensionDesign({ hook: { form } }))
      return extensionHooks(drawn, drawn.freeLengthMm, place).right.path.replace(/A\S+ \S+ 0 (\d) \d \S+ [^A-Z]+/g, 'A$1').replace(/([MLH])[^A-Z]+/g, '$1')
    })
    // A large arc; a small one; a line over the face and a large one; two bends, a shank between them and a large one
    expect(drawings).toEqual(['MA1', 'MA0', 'MLA1', 'MA0HA0A1'])
  })

  it('draws a hook far longer than its loop on a shank', () => {
    const design = extensionDesign({ insideHooksFreeLengthMm: 120 })
    const drawn = drawnExtension(design)
    expect(drawn.hookLengthMm).toBeCloseTo((120 - 33.6) / 2, 6)
    expect(extensionHooks(drawn, 120, place).right.path).toContain('H')
  })
})

describe('an extension spring that is pulled', () => {
  it('drops the inside of the moving hook straight to its point of the chart', () => {
    for (const units of ['metric', 'inch'] as const) {
      const motion = motionOf(extensionDesign(), { units })
      for (const at of [motion.low, 70, motion.high]) {
        const { under, over } = motion.moving(at)
        const pin = flatten(under).findLast(shape => shape.kind === 'circle' && shape.look === 'pin')
        const now = over.find(shape => shape.kind === 'path' && shape.look === 'now')
        if (pin?.kind !== 'circle' || now?.kind !== 'path') throw new Error('A pin and a point must be drawn')
        expect(pin.xPx + pin.radiusPx).toBeCloseTo((pathPoints(now.d)[0]?.x ?? 0) + 7, 1)
      }
    }
  })

  it('begins the load line at the initial tension and marks the limit', () => {
    const design = extensionDesign()
    const motion = motionOf(design)
    const line = motion.still.find(shape => shape.kind === 'path' && shape.look === 'load-line')
    const base = motion.still.find(shape => shape.kind === 'path' && shape.look === 'base')
    if (line?.kind !== 'path' || base?.kind !== 'path') throw new Error('A line and a base must be drawn')
    const [from, to] = pathPoints(line.d)
    const bottom = pathPoints(base.d)[0]?.y ?? 0
    // Initial tension 12 N, and 90.5 N at the limit, on one axis from nought
    expect((bottom - (from?.y ?? 0)) / (bottom - (to?.y ?? 0))).toBeCloseTo(12 / (design.evaluation.greatestForceN ?? 0), 3)
    expect(motion.still.some(shape => shape.kind === 'text' && shape.runs.some(run => run.text === 'over the limit'))).toBe(true)
  })

  it('takes hold of the moving hook and gives back the length under a finger', () => {
    const motion = motionOf(extensionDesign())
    const box = motion.grip?.boxAt(70)
    expect(motion.grip?.placeOf((box?.xPx ?? 0) + (box?.widthPx ?? 0) / 2)).toBeCloseTo(70, 6)
    expect(motion.stops(true).last).toBeLessThanOrEqual(25)
  })

  it('reads off what the evaluation says, and stops being sound at the limit', () => {
    const design = extensionDesign()
    const motion = motionOf(design)
    expect(motion.reading(80).load.replaceAll('\u202f', ' ')).toBe('60.5 N')
    expect(motionSentence(motion, motion.reading(80)).replaceAll('\u202f', ' ')).toBe('At 80.0 mm it pulls with 60.5 N, at 67 % of the load allowed. Within what body and hooks are allowed.')
    expect(motion.reading(motion.low).stateWords).toContain('initial tension')
    expect(motion.reading((design.evaluation.greatestLengthMm ?? 0) * 1.01).tone).toBe('stop')
    expect(motion.table.rows.map(row => row.name)).toEqual(['Free, initial tension', 'Load F1', 'Load F2', 'Limit of body or hooks'])
  })

  it('leaves a length that is shorter than the free one off the chart, but not out of the table', () => {
    const design = extensionDesign({ points: [{ lengthMm: 50 }, { lengthMm: 80 }] })
    const motion = motionOf(design)
    expect(motion.still.filter(shape => shape.kind === 'circle' && shape.look === 'wanted')).toHaveLength(1)
    expect(motion.table.rows.map(row => row.name)).toContain('Load F1')
  })

  it.each(HOOK_FORMS)('keeps %s figure and chart to their box, and no words on each other, at every width', (form) => {
    for (const widthPx of WIDTHS) {
      for (const units of ['metric', 'inch'] as const) {
        const design = extensionDesign({ hook: { form }, points: [{ lengthMm: 85 }] })
        const figure = figureOf(design, { widthPx, units })
        if (!figure) throw new Error('It must be drawn')
        expect(partsOutside(figure, figure.shapes)).toEqual([])
        expect(wordsThatMeet(figure.shapes)).toEqual([])
        const motion = motionOf(design, { widthPx, units })
        for (const at of [motion.low, (motion.low + motion.high) / 2, motion.high]) {
          expect(partsOutside(motion, everything(motion, at))).toEqual([])
          expect(wordsThatMeet(everything(motion, at))).toEqual([])
        }
      }
    }
  })

  it('names itself in one sentence', () => {
    expect(figureOf(extensionDesign(), { widthPx: 540, units: 'metric' })?.sentence.replaceAll('\u202f', ' ')).toBe(
      'Extension spring in side view, 54.4 mm long inside its full loops, outside diameter 13.6 mm, wire 1.60 mm, 20 coils in the body, right-hand.',
    )
  })

  it('shows the figure pulled to a length, its hooks as far apart', () => {
    const shown = figureOf(extensionDesign(), { widthPx: 540, units: 'metric', shownLengthMm: 80 })
    expect(shown?.sentence.replaceAll('\u202f', ' ')).toContain('80.0 mm long')
    expect(shown?.shapes.some(shape => shape.kind === 'text' && shape.runs.some(run => run.text.endsWith('80.0')))).toBe(true)
  })

  it('redraws in well under 2 ms', () => {
    const motion = motionOf(extensionDesign())
    for (let i = 0; i < 50; i++) motion.moving(55 + i / 3)
    const start = performance.now()
    for (let i = 0; i < 200; i++) motion.moving(55 + i / 6)
    expect((performance.now() - start) / 200).toBeLessThan(2)
  })
})
