import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compressionShapes, faceChordMm } from '#shared/spring/drawing/compression'
import { centreLine, drawnSolidLengthMm } from '#shared/spring/drawing/drawn-spring'
import { halfCoils } from '#shared/spring/drawing/half-coils'
import { anySpring, demoSpring, flatten, pathPoints } from './springs'

const place = { pxPerMm: 10, x0Px: 50, axisYPx: 200 }
const strands = (hand: 'left' | 'right') =>
  halfCoils({ centre: centreLine(demoSpring, 60), meanDiameterMm: 20, fromTurn: 0, toTurn: 10.25, hand }, place)

/** A cubic's point at u, from 'C x1 y1 x2 y2 x y' after (x0, y0). */
const cubic = (u: number, a: number, b: number, c: number, d: number) => (1 - u) ** 3 * a + 3 * (1 - u) ** 2 * u * b + 3 * (1 - u) * u ** 2 * c + u ** 3 * d

describe('half coils', () => {
  it('lets near strands of a right-hand spring fall from top to bottom, and rise for a left-hand one', () => {
    for (const [hand, falls] of [['right', true], ['left', false]] as const) {
      const pieces = strands(hand).near.split('M').filter(Boolean).map((piece) => pathPoints('M' + piece))
      expect(pieces.length).toBeGreaterThanOrEqual(10)
      const first = pieces[1]
      expect((first?.at(-1)?.y ?? 0) > (first?.[0]?.y ?? 0)).toBe(falls)
    }
  })

  it('cuts upright at the crowns: the path begins and ends level', () => {
    const piece = strands('right').far.split('M').filter(Boolean)[2] ?? ''
    expect(piece).toMatch(/^[\d.]+ [\d.]+H[\d.]+C/)
    expect(piece).toMatch(/H[\d.]+$/)
  })

  it('follows the cosine of the projected helix to a tenth of a pixel on a coil 200 px wide', () => {
    const centre = centreLine(demoSpring, 60)
    // third near strand: turns 2 to 2.5, in four pieces of an eighth of a turn
    const piece = strands('right').near.split('M').filter(Boolean)[2] ?? ''
    const curves = [...piece.matchAll(/C([^CH]+)/g)].map(([, numbers = '']) => numbers.split(' ').map(Number))
    expect(curves).toHaveLength(4)
    let [x0, y0] = [50 + 10 * centre(2), 100]
    curves.forEach(([x1 = 0, y1 = 0, x2 = 0, y2 = 0, x3 = 0, y3 = 0], i) => {
      for (const u of [0.25, 0.5, 0.75]) {
        const turns = 2 + (i + u) / 8
        expect(Math.abs(cubic(u, x0, x1, x2, x3) - (50 + 10 * centre(turns)))).toBeLessThan(0.1)
        expect(Math.abs(cubic(u, y0, y1, y2, y3) - (200 - 100 * Math.cos(2 * Math.PI * turns)))).toBeLessThan(0.1)
      }
      ;[x0, y0] = [x3, y3]
    })
  })

  it('crowns every turn of a near strand at the top and bottom of the coil', () => {
    const crowns = pathPoints(strands('right').crowns)
    expect(crowns.every(({ y }) => Math.abs(Math.abs(y - 200) - 100) < 0.01)).toBe(true)
    // 10 whole near strands with two crowns each, and the quarter strand at the end with one
    expect(crowns).toHaveLength(21)
  })
})

describe('the ground face', () => {
  it('reaches from the outside diameter at the tip to the chord left half a turn further on', () => {
    const chord = faceChordMm(demoSpring, 60, 'left')
    // at t = 0 the centre lies in the face: the chord is the whole wire, up to De/2 = 11.25
    expect(chord?.highMm).toBeCloseTo(11.25, 9)
    // at t = 0.5 the centre is d/3 inside: half chord = sqrt(1.25^2 - 0.8333^2) = 0.9317, below the axis at D/2
    expect(chord?.lowMm).toBeCloseTo(-(10 + Math.sqrt(1.25 ** 2 - (2.5 / 3) ** 2)), 2)
  })

  it('mirrors the left face on a spring with a whole number of turns', () => {
    const spring = { ...demoSpring, activeCoils: 8, totalCoils: 10 }
    const [left, right] = [faceChordMm(spring, 60, 'left'), faceChordMm(spring, 60, 'right')]
    expect(right?.highMm).toBeCloseTo(left?.highMm ?? 0, 9)
    expect(right?.lowMm).toBeCloseTo(left?.lowMm ?? 0, 9)
  })

  it('is drawn on ground ends only', () => {
    const faces = (ends: typeof demoSpring.ends) => flatten(compressionShapes({ ...demoSpring, ends }, 60, place)).filter(({ look }) => look === 'w-face').length
    expect([faces('closed-ground'), faces('open-ground'), faces('closed'), faces('open')]).toEqual([2, 2, 0, 0])
  })
})

describe('the side view', () => {
  it('draws far strands first, then near ones, then the crowns over the cuts', () => {
    const looks = flatten(compressionShapes(demoSpring, 60, place)).map(({ look }) => look)
    const order = ['w-edge far', 'w-body far', 'w-edge near', 'w-body near'].map((look) => looks.indexOf(look))
    expect(order).toEqual([...order].sort((a, b) => a - b))
    expect(order[0]).toBeGreaterThanOrEqual(0)
    expect(looks.lastIndexOf('w-body near round')).toBeGreaterThan(looks.indexOf('w-body near'))
  })

  it('strokes the wire as wide as it is, with half the outline on each side', () => {
    const widths = flatten(compressionShapes(demoSpring, 60, place)).flatMap((shape) => (shape.kind === 'path' && /^w-(edge|body) near$/.test(shape.look) ? [shape.strokePx ?? 0] : []))
    expect(widths).toHaveLength(2)
    expect(((widths[0] ?? 0) + (widths[1] ?? 0)) / 2).toBeCloseTo(25, 2)
  })

  it('stays within length and outside diameter, with no number that is not finite, for any spring pressed any way', () => {
    fc.assert(fc.property(anySpring, fc.double({ min: 0, max: 1, noNaN: true }), (spring, pressed) => {
      const solid = drawnSolidLengthMm(spring)
      const lengthMm = solid + (spring.freeLengthMm - solid) * pressed
      const scaled = { pxPerMm: 400 / spring.freeLengthMm, x0Px: 50, axisYPx: 300 }
      const shapes = compressionShapes(spring, lengthMm, scaled)
      const radiusPx = spring.meanDiameterMm / 2 * scaled.pxPerMm
      expect(/NaN|Infinity|null/.test(JSON.stringify(shapes))).toBe(false)
      for (const shape of flatten(shapes)) {
        if (shape.kind !== 'path' || !shape.look.startsWith('w-edge')) continue
        const points = pathPoints(shape.d)
        const xs = points.map(({ x }) => x)
        expect(Math.min(...xs)).toBeGreaterThanOrEqual(50 - 0.31)
        expect(Math.max(...xs)).toBeLessThanOrEqual(50 + lengthMm * scaled.pxPerMm + 0.31)
        expect(Math.max(...points.map(({ y }) => Math.abs(y - 300)))).toBeLessThanOrEqual(radiusPx + 0.01)
      }
      for (const end of ['left', 'right'] as const) {
        const chord = faceChordMm(spring, lengthMm, end)
        if (chord) expect(Math.max(chord.highMm, -chord.lowMm)).toBeLessThanOrEqual((spring.meanDiameterMm + spring.wireDiameterMm) / 2 + 1e-9)
      }
    }), { numRuns: 300 })
  })
})
