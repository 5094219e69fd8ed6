import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { drawnSolidLengthMm } from '#shared/spring/drawing/drawn-spring'
import { figureShapes } from '#shared/spring/drawing/figure'
import { chartX, chartY, forceAtN, forceTicks } from '#shared/spring/drawing/load-chart'
import { clampLength, layoutPress, pressMoving, sliderPlace, type PressOptions } from '#shared/spring/drawing/press'
import { pressSteps } from '#shared/spring/drawing/press-steps'
import { svgMarkup } from '#shared/spring/drawing/svg'
import { tinyShapes } from '#shared/spring/drawing/tiny'
import { chartRows, figureSentence, readingSentence, readPress } from '#shared/spring/drawing/words'
import { anySpring, demoSpring, flatten, pathPoints } from './springs'

// R = G d^4 / (8 D^3 n) with G = 81 500 MPa, EN 10270-1 (reference/springs.md 2.1 and 11)
const rateNPerMm = 81500 * 2.5 ** 4 / (8 * 20 ** 3 * 8.25)
const demo = {
  spring: demoSpring, rateNPerMm, leastWorkingLengthMm: 29.7,
  points: [{ lengthMm: 50, forceN: 60.3, toleranceN: 10.6 }, { lengthMm: 35, forceN: 150.7, toleranceN: 11.9 }],
}
const lay = (options: Partial<PressOptions> = {}) => layoutPress(demo, { widthPx: 540, units: 'metric', ...options })
const words = (layout: ReturnType<typeof lay>) => flatten(layout.still).flatMap((shape) => (shape.kind === 'text' ? [shape.runs.map(({ text }) => text).join('')] : []))

describe('the spring and its load line on one axis', () => {
  it('puts the point of the load line straight under the moving plate', () => {
    const layout = lay()
    const { under, over } = pressMoving(layout, 42)
    const plate = under.findLast((shape) => shape.kind === 'path' && shape.look === 'plate')
    const now = over.find((shape) => shape.kind === 'path' && shape.look === 'now')
    const plateX = plate?.kind === 'path' ? pathPoints(plate.d)[0]?.x ?? 0 : 0
    const corners = now?.kind === 'path' ? pathPoints(now.d) : []
    const middle = { x: (corners[0]?.x ?? 0) / 2 + (corners[2]?.x ?? 0) / 2, y: (corners[1]?.y ?? 0) / 2 + (corners[3]?.y ?? 0) / 2 }
    expect(Math.abs(plateX - middle.x)).toBeLessThanOrEqual(1.01)
    expect(middle.x).toBeCloseTo(chartX(layout.frame, 42), 1)
    expect(middle.y).toBeCloseTo(chartY(layout.frame, rateNPerMm * 18), 1)
  })

  it('scales both axes from nought to round numbers past the solid load', () => {
    const { ticksN } = forceTicks(lay().charted, 'metric')
    // solid load 6.0296 (60 - 25.625) = 207 N: ticks to 250 as in the mock
    expect(ticksN).toEqual([0, 50, 100, 150, 200, 250])
    const inch = forceTicks(lay().charted, 'inch')
    expect(inch.ticksN.map((tick) => Math.round(tick / 4.4482216152605))).toEqual([0, 10, 20, 30, 40, 50])
  })

  it('makes room on the force axis for a tolerance above the solid load', () => {
    const charted = { ...lay().charted, points: [{ lengthMm: 30, forceN: 180, toleranceN: 120 }] }
    expect(forceTicks(charted, 'metric').ticksN.at(-1)).toBeGreaterThanOrEqual(300)
  })

  it('names the axes with their units, says what the chart shows, and marks solid length and loads', () => {
    const shown = words(lay({ lengthChain: true, allDimensions: true }))
    for (const word of ['Force at each length', 'force, N', 'length, mm', 'solid', '25.6\u202fmm', 'F1\u202f60\u202fN', 'F2\u202f151\u202fN']) expect(shown).toContain(word)
    for (const word of ['Lc', 'L2', 'L1', 'L0']) expect(shown.some((text) => text.startsWith(word + '\u202f=\u202f'))).toBe(true)
    const inch = words(lay({ units: 'inch' }))
    for (const word of ['force, lbf', 'length, in', '1.009\u202fin', 'F2\u202f34\u202flbf']) expect(inch).toContain(word)
  })

  it('takes the larger of the calculated and the drawn solid length, and never more than the free one', () => {
    const solid = (solidLengthMm: number) => layoutPress({ ...demo, solidLengthMm }, { widthPx: 540, units: 'metric' }).charted.solidLengthMm
    expect(solid(25.9)).toBe(25.9)
    expect(solid(20)).toBe(25.625)
    expect(solid(99)).toBe(60)
  })

  it('lays the slider from the solid length to the free one, its thumb under the plate', () => {
    const layout = lay()
    const { leftPx, widthPx } = sliderPlace(layout, 28)
    expect(leftPx + 14).toBeCloseTo(chartX(layout.place, 25.625), 9)
    expect(leftPx + widthPx - 14).toBeCloseTo(chartX(layout.place, 60), 9)
    expect([10, 42, 70].map((lengthMm) => clampLength(layout.charted, lengthMm))).toEqual([25.625, 42, 60])
  })

  it('is drawn at the width it has, down to 280 px, and everything stays on it', () => {
    for (const widthPx of [280, 328, 430, 431, 540, 1200]) {
      const layout = lay({ widthPx, allDimensions: true, lengthChain: true })
      for (const lengthMm of [25.625, 42, 60]) {
        const { under, over } = pressMoving(layout, lengthMm)
        for (const shape of flatten([...under, ...layout.still, ...over])) {
          if (shape.kind !== 'path') continue
          for (const { x, y } of pathPoints(shape.d)) {
            expect(x).toBeGreaterThanOrEqual(0)
            expect(x).toBeLessThanOrEqual(widthPx)
            expect(y).toBeGreaterThanOrEqual(0)
            expect(y).toBeLessThanOrEqual(layout.heightPx)
          }
        }
      }
    }
  })

  it('holds a squat spring to a height that fits a page', () => {
    const squat = { ...demoSpring, wireDiameterMm: 2, meanDiameterMm: 38, activeCoils: 3, totalCoils: 5, freeLengthMm: 22 }
    const layout = layoutPress({ spring: squat, rateNPerMm: 1 }, { widthPx: 540, units: 'metric' })
    expect(40 * layout.place.pxPerMm).toBeLessThanOrEqual(260.01)
  })

  it('gives finite coordinates for any spring, width and unit', () => {
    fc.assert(fc.property(anySpring, fc.integer({ min: 1, max: 1600 }), fc.constantFrom('metric', 'inch'), fc.double({ min: 0, max: 1, noNaN: true }), fc.boolean(), (spring, widthPx, units, pressed, full) => {
      const points = [{ lengthMm: spring.freeLengthMm * 0.9, forceN: 5, toleranceN: 1 }]
      const layout = layoutPress({ spring, rateNPerMm: 2, points }, { widthPx, units, allDimensions: full, lengthChain: full })
      const lengthMm = layout.charted.solidLengthMm + (spring.freeLengthMm - layout.charted.solidLengthMm) * pressed
      const { under, over } = pressMoving(layout, lengthMm)
      expect(/NaN|Infinity|null/.test(JSON.stringify([layout.still, layout.frame, layout.place, under, over]))).toBe(false)
      expect(flatten(layout.still).length).toBeLessThan(250)
    }), { numRuns: 200 })
  })

  it('redraws in well under 4 ms', () => {
    const layout = lay({ allDimensions: true })
    for (let i = 0; i < 50; i++) pressMoving(layout, 30 + i / 2)
    const start = performance.now()
    for (let i = 0; i < 200; i++) pressMoving(layout, 26 + i / 6)
    expect((performance.now() - start) / 200).toBeLessThan(2)
  })
})

describe('the plain figure', () => {
  it('interrupts a long thin spring so that its coils can be seen, but writes its true length', () => {
    const thin = { ...demoSpring, wireDiameterMm: 0.8, meanDiameterMm: 5, activeCoils: 60.5, totalCoils: 62.5, freeLengthMm: 200 }
    const figure = figureShapes(thin, { widthPx: 540, units: 'metric' })
    expect(figure.isInterrupted).toBe(true)
    expect(flatten(figure.shapes).filter(({ look }) => look === 'break')).toHaveLength(2)
    expect(JSON.stringify(figure.shapes)).toContain('200.0')
    expect(figureShapes(demoSpring, { widthPx: 540, units: 'metric' }).isInterrupted).toBe(false)
  })

  it('keeps to its width and height for any spring', () => {
    fc.assert(fc.property(anySpring, fc.integer({ min: 280, max: 1200 }), fc.double({ min: 0, max: 1, noNaN: true }), (spring, widthPx, pressed) => {
      const solid = drawnSolidLengthMm(spring)
      const figure = figureShapes(spring, { widthPx, units: 'metric', shownLengthMm: solid + (spring.freeLengthMm - solid) * pressed })
      expect(/NaN|Infinity|null/.test(JSON.stringify(figure))).toBe(false)
      expect(figure.heightPx).toBeLessThan(360)
      for (const shape of figure.shapes) {
        if (shape.kind !== 'path' || shape.look.startsWith('w-')) continue
        for (const { x } of pathPoints(shape.d)) expect(x > -21 && x < widthPx + 21).toBe(true)
      }
    }), { numRuns: 200 })
  })
})

describe('the words beside the drawing', () => {
  const { charted } = lay()

  it('reads the pressed spring as the mock-up does', () => {
    const reading = readPress(demoSpring, charted, 42, 'metric', 1064)
    expect(readingSentence(reading)).toBe('At 42.0\u202fmm it pushes with 108.5\u202fN, at 33\u202f% of the stress allowed. Within its working range.')
    expect(readingSentence(readPress(demoSpring, charted, 42, 'inch'))).toBe('At 1.654\u202fin it pushes with 24.4\u202flbf. Within its working range.')
  })

  it('tells free, solid, too close and too much stress apart', () => {
    const state = (lengthMm: number, allowable?: number) => readPress(demoSpring, charted, lengthMm, 'metric', allowable).state
    expect([state(60), state(42), state(28), state(25.625), state(35, 400)]).toEqual(['free', 'working', 'too-close', 'solid', 'over-stress'])
    expect(readPress(demoSpring, { ...charted, leastWorkingLengthMm: null }, 42, 'metric').state).toBe('between')
  })

  it('gives the chart as rows, longest first', () => {
    expect(chartRows(charted, 'metric').map(({ name, place, load, tolerance }) => [name, place, load, tolerance].join('|').replaceAll('\u202f', ' '))).toEqual([
      'Free|60.0 mm|0.000 N|', 'Load F1|50.0 mm|60.3 N|±10.6 N', 'Load F2|35.0 mm|150.7 N|±11.9 N', 'Least working length|29.7 mm|182.7 N|', 'Solid, not for use|25.6 mm|207.3 N|',
    ])
    expect(forceAtN(charted, 25.625)).toBeCloseTo(207.27, 1)
  })

  it('names the figure in one sentence', () => {
    expect(figureSentence(demoSpring, 60, 'metric').replaceAll('\u202f', ' ')).toBe(
      'Compression spring in side view, 60.0 mm long, outside diameter 22.5 mm, inside diameter 17.5 mm, wire 2.50 mm, 8.25 active of 10.25 coils, ends closed and ground, right-hand.',
    )
  })
})

describe('the drawing as SVG text', () => {
  it('has an ink for every look and no number that is not finite', () => {
    const layout = lay({ allDimensions: true, lengthChain: true })
    const { under, over } = pressMoving(layout, 42)
    const figure = figureShapes({ ...demoSpring, hand: 'left', ends: 'closed' }, { widthPx: 300, units: 'inch' })
    const shapes = [...under, ...layout.still, ...over, ...figure.shapes, ...(['push', 'pull', 'twist'] as const).flatMap(tinyShapes)]
    const markup = svgMarkup({ widthPx: 540, heightPx: layout.heightPx, shapes, name: 'a < b & "c"' })
    expect(markup).not.toMatch(/NaN|undefined|<style/)
    expect(markup).toContain('aria-label="a &#60; b &#38; &#34;c&#34;"')
    expect(markup.match(/<svg /g)?.length).toBe(markup.match(/<\/svg>/g)?.length)
  })

  it('refuses a look that has no ink', () => {
    expect(() => svgMarkup({ widthPx: 1, heightPx: 1, name: '', shapes: [{ kind: 'path', look: 'unheard-of', d: 'M0 0' }] })).toThrow('unheard-of')
  })
})

describe('the stops of the slider', () => {
  const { charted } = lay()

  it('stops at every tenth of a millimetre from the free length down, and at the solid length last', () => {
    const steps = pressSteps(charted, 'metric')
    expect(steps.last).toBe(344)
    expect([steps.lengthMmAt(344), steps.lengthMmAt(343), steps.lengthMmAt(0)].map((value) => Number(value.toFixed(6)))).toEqual([60, 59.9, 25.625])
    expect(steps.lengthMmAt(steps.indexOf(42))).toBeCloseTo(42, 9)
    expect([steps.indexOf(0), steps.indexOf(99)]).toEqual([0, 344])
  })

  it('stops at round inches for inch units and in about twenty steps for reduced motion', () => {
    const inch = pressSteps(charted, 'inch')
    expect((60 - inch.lengthMmAt(inch.last - 1)) / 25.4).toBeCloseTo(0.005, 9)
    expect(pressSteps(charted, 'metric', true).last).toBe(18)
  })

  it('always ends at both lengths and rises', () => {
    fc.assert(fc.property(fc.double({ min: 0.01, max: 600, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), fc.constantFrom('metric', 'inch'), fc.boolean(), (freeLengthMm, share, units, coarse) => {
      const solidLengthMm = freeLengthMm * share
      const steps = pressSteps({ freeLengthMm, solidLengthMm }, units, coarse)
      expect(steps.lengthMmAt(steps.last)).toBe(freeLengthMm)
      expect(steps.lengthMmAt(0)).toBeCloseTo(solidLengthMm, 9)
      expect(steps.last).toBeLessThanOrEqual(350)
      expect(steps.lengthMmAt(1)).toBeGreaterThanOrEqual(steps.lengthMmAt(0))
    }))
  })
})
