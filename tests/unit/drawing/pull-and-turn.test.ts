import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluateExtension, evaluateTorsion, type ExtensionInput, type TorsionInput } from '#shared/spring'
import { HOOK_FORMS } from '#shared/spring/codes'
import { bodyPitchMm } from '#shared/spring/drawing/extension'
import { figureOf } from '#shared/spring/drawing/figure-of'
import { layoutMotion } from '#shared/spring/drawing/motion'
import { drawnExtension, drawnTorsion } from '#shared/spring/drawing/moved'
import type { Shape } from '#shared/spring/drawing/shapes'
import { loadedLegMm, meanDiameterAtMm } from '#shared/spring/drawing/torsion'

const extension = (overrides: Partial<ExtensionInput> = {}) => {
  const spring: ExtensionInput = {
    kind: 'extension', material: 'EN10270-1-SH', wireDiameterMm: 1.6, meanDiameterMm: 12, bodyCoils: 20, initialTensionN: 12, hook: { form: 'full-loop' }, points: [{ lengthMm: 60 }, { lengthMm: 80 }], ...overrides,
  }
  return { kind: 'extension' as const, spring, evaluation: evaluateExtension(spring) }
}
const torsion = (overrides: Partial<TorsionInput> = {}) => {
  const spring: TorsionInput = {
    kind: 'torsion', material: 'EN10270-1-SH', wireDiameterMm: 2, meanDiameterMm: 16, bodyCoils: 5.25, legs: [{ lengthMm: 30, form: 'tangential' }, { lengthMm: 30, form: 'tangential' }], points: [{ angleDeg: 30 }, { angleDeg: 90 }], ...overrides,
  }
  return { kind: 'torsion' as const, spring, evaluation: evaluateTorsion(spring) }
}

const flat = (shapes: readonly Shape[]): Shape[] => shapes.flatMap(shape => (shape.kind === 'clip' ? flat(shape.shapes) : [shape]))
const numbersOf = (shapes: readonly Shape[]) => flat(shapes).flatMap(shape =>
  shape.kind === 'path' ? [...shape.d.matchAll(/-?\d+(?:\.\d+)?|NaN|Infinity/g)].map(match => Number(match[0])) : shape.kind === 'circle' ? [shape.xPx, shape.yPx, shape.radiusPx] : shape.kind === 'text' ? [shape.xPx, shape.yPx] : [])

describe('an extension spring', () => {
  it('has its coils closed at rest and opens each by its share of the pull', () => {
    const drawn = drawnExtension(extension())
    expect(bodyPitchMm(drawn, drawn.freeLengthMm)).toBe(1.6)
    expect(bodyPitchMm(drawn, drawn.freeLengthMm + 10)).toBeCloseTo(1.6 + 10 / 20, 12)
  })

  it.each(HOOK_FORMS)('draws %s to scale: the hooks are as far apart as the dimension says, at any pull', (form) => {
    const design = extension({ hook: { form } })
    const motion = layoutMotion(design, { widthPx: 540, units: 'metric' })
    if (!motion) throw new Error('It must be drawn')
    const loops = (at: number) => {
      const path = flat(motion.moving(at).under).find(shape => shape.kind === 'path' && shape.look.startsWith('w-edge near round') && shape.d.includes('A'))
      if (path?.kind !== 'path') throw new Error('Hooks must be drawn')
      return path.d
    }
    expect(loops(motion.low)).not.toBe(loops(motion.high))
    // The slider runs over the same millimetres as the drawing.
    const grip = (at: number) => motion.grip?.boxAt(at).xPx ?? 0
    const pxPerMm = (grip(motion.high) - grip(motion.low)) / (motion.high - motion.low)
    expect(motion.slider.widthPx - 28).toBeCloseTo(pxPerMm * (motion.high - motion.low), 6)
    expect(motion.grip?.placeOf(grip(70) + 13)).toBeCloseTo(70, 6)
  })

  it('reads off what the evaluation says, and stops being sound at the limit', () => {
    const design = extension()
    const motion = layoutMotion(design, { widthPx: 540, units: 'metric' })
    expect(motion?.reading(80).load.replaceAll('\u202f', ' ')).toBe('60.5 N')
    expect(motion?.reading(motion.low).stateWords).toContain('initial tension')
    expect(motion?.reading((design.evaluation.greatestLengthMm ?? 0) * 1.01).tone).toBe('stop')
    expect(motion?.table.rows.map(row => row.name)).toEqual(['Free, initial tension', 'Load F1', 'Load F2', 'Limit of body or hooks'])
  })
})

describe('a torsion spring', () => {
  it('shrinks as D Nb/(Nb + turns) and turns its leg by the angle', () => {
    const drawn = drawnTorsion(torsion())
    const share = drawn.bodyShare
    expect(meanDiameterAtMm(drawn, 90)).toBeCloseTo((16 * 5.25) / (5.25 + 0.25 * share), 9)
    const direction = (angle: number) => {
      const { fromX, fromY, toX, toY } = loadedLegMm(drawn, angle, 30)
      return Math.atan2(toY - fromY, toX - fromX)
    }
    const turned = ((direction(0) - direction(40)) * 180) / Math.PI
    expect((turned + 360) % 360).toBeCloseTo(40, 9)
  })

  it('has legs that leave the ring as tangents, as long as they are', () => {
    const drawn = drawnTorsion(torsion())
    for (const angle of [0, 33, 90]) {
      const { fromX, fromY, toX, toY } = loadedLegMm(drawn, angle, 30)
      expect(fromX * (toX - fromX) + fromY * (toY - fromY)).toBeCloseTo(0, 9)
      expect(Math.hypot(toX - fromX, toY - fromY)).toBeCloseTo(30, 9)
      expect(Math.hypot(fromX, fromY)).toBeCloseTo(meanDiameterAtMm(drawn, angle) / 2, 9)
    }
  })

  it('reads off what the evaluation says', () => {
    const design = torsion()
    const motion = layoutMotion(design, { widthPx: 360, units: 'metric' })
    expect(motion?.reading(90).load.replaceAll('\u202f', ' ')).toBe('895.2 N·mm')
    expect(motion?.reading((design.evaluation.greatestAngleDeg ?? 0) * 1.01).tone).toBe('stop')
    expect(layoutMotion(design, { widthPx: 360, units: 'inch' })?.reading(90).load).toContain('lbf·in')
  })
})

describe('whatever can be drawn', () => {
  const size = (min: number, max: number) => fc.double({ min, max, noNaN: true })
  it('has only finite places, at any width, and nothing at all for sizes that are no spring', () => {
    let drawn = 0
    fc.assert(fc.property(
      fc.record({ d: size(0.05, 12), w: size(1.2, 25), n: size(0.2, 60), L: size(1, 300), form: fc.constantFrom(...HOOK_FORMS), leg: size(0.1, 200), opens: fc.boolean(), hand: fc.constantFrom('left' as const, 'right' as const), widthPx: fc.constantFrom(200, 280, 360, 1000) }),
      ({ d, w, n, L, form, leg, opens, hand, widthPx }) => {
        const shape = { wireDiameterMm: d, meanDiameterMm: d * w, bodyCoils: n, hand }
        const designs = [
          extension({ ...shape, hook: { form }, points: [{ lengthMm: L }] }),
          torsion({ ...shape, legs: [{ lengthMm: leg, form: 'tangential' }, { lengthMm: leg, form: 'straight' }], loadOpens: opens, points: [{ angleDeg: L }] }),
        ]
        for (const design of designs) {
          const motion = layoutMotion(design, { widthPx, units: 'metric' })
          const figure = figureOf(design, { widthPx, units: 'inch' })
          if (!motion || !figure) continue
          drawn++
          const places = numbersOf([...motion.still, ...motion.moving(motion.low).under, ...motion.moving(motion.high).under, ...motion.moving(motion.high).over, ...figure.shapes])
          expect(places.every(Number.isFinite)).toBe(true)
          expect(motion.widthPx).toBeGreaterThanOrEqual(280)
        }
      },
    ), { numRuns: 200, seed: 9 })
    expect(drawn).toBeGreaterThan(150)
  })
})
