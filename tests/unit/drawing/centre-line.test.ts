import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { centreLine, drawnSolidLengthMm, drawnPitchMm, isDrawable } from '#shared/spring/drawing/drawn-spring'
import { pitchMm } from '#shared/spring/mechanics/compression/end-geometry'
import { anySpring, demoSpring } from './springs'

describe('the centre line of the wire', () => {
  it('gives the pitch of L0 = n p + 2 d for closed and ground ends', () => {
    // mock study 1: pitch 6.67 mm, solid length 25.6 mm
    expect(drawnPitchMm(demoSpring, 60)).toBeCloseTo((60 - 5) / 8.25, 12)
    expect(drawnSolidLengthMm(demoSpring)).toBeCloseTo(25.625, 12)
  })

  it('follows the pitch formulas of every kind of end', () => {
    // reference/springs.md 2.2, pitch column
    expect(drawnPitchMm({ ...demoSpring, ends: 'closed' }, 60)).toBeCloseTo((60 - 7.5) / 8.25, 12)
    expect(drawnPitchMm({ ...demoSpring, ends: 'open', totalCoils: 8.25 }, 60)).toBeCloseTo((60 - 2.5) / 8.25, 12)
    expect(drawnPitchMm({ ...demoSpring, ends: 'open-ground', totalCoils: 9.25 }, 60)).toBeCloseTo(60 / 9.25, 12)
  })

  it('has the free pitch that the mechanics calculate', () => {
    fc.assert(fc.property(anySpring, (spring) => {
      expect(drawnPitchMm(spring, spring.freeLengthMm)).toBeCloseTo(pitchMm(spring), 9)
    }))
  })

  it('starts a ground tip in the face, half a wire up after 3/4 turn and one wire up after one turn', () => {
    const centre = centreLine(demoSpring, 60)
    expect(centre(0)).toBe(0)
    expect(centre(0.75)).toBeCloseTo(1.25, 12)
    expect(centre(1)).toBeCloseTo(2.5, 12)
    expect(centre(10.25)).toBeCloseTo(60, 12)
    expect(centre(9.25)).toBeCloseTo(57.5, 12)
  })

  it('starts an unground closed end half a wire inside and lays the coil one wire up', () => {
    const centre = centreLine({ ...demoSpring, ends: 'closed' }, 60)
    expect(centre(0)).toBeCloseTo(1.25, 12)
    expect(centre(1)).toBeCloseTo(3.75, 12)
  })

  it('lets neighbouring coils touch at the solid length: one turn rises one wire', () => {
    for (const ends of ['closed-ground', 'closed'] as const) {
      const spring = { ...demoSpring, ends }
      const centre = centreLine(spring, drawnSolidLengthMm(spring))
      for (let turns = 1; turns <= 8.25; turns += 0.05) expect(centre(turns + 1) - centre(turns)).toBeCloseTo(2.5, 9)
    }
  })

  it('keeps the shape of the end coils under load', () => {
    const free = centreLine(demoSpring, 60)
    const pressed = centreLine(demoSpring, 35)
    for (let turns = 0; turns <= 0.75; turns += 0.05) expect(pressed(turns)).toBeCloseTo(free(turns), 12)
  })

  it('handles ends of another number of dead turns without a jump', () => {
    for (const totalCoils of [8.75, 9.25, 9.75, 10.75, 11.25, 12.25]) {
      const centre = centreLine({ ...demoSpring, totalCoils }, 60)
      let before = centre(0)
      for (let turns = 0.01; turns <= totalCoils; turns += 0.01) {
        const now = centre(turns)
        expect(now - before).toBeGreaterThan(0)
        expect(now - before).toBeLessThan(0.12)
        before = now
      }
      expect(before).toBeCloseTo(60, 0)
    }
  })

  it('rises all the way, never jumps, and ends as far from the right face as it began from the left', () => {
    fc.assert(fc.property(anySpring, fc.double({ min: 0, max: 1, noNaN: true }), (spring, pressed) => {
      const solid = drawnSolidLengthMm(spring)
      const lengthMm = solid + (spring.freeLengthMm - solid) * pressed
      const centre = centreLine(spring, lengthMm)
      const step = spring.totalCoils / 400
      // the closing quarter of a ground end rises half a wire, so up to 2.6 wires a turn in its middle
      const steepest = Math.max(drawnPitchMm(spring, lengthMm), spring.wireDiameterMm) * 2.6 * step
      const places = Array.from({ length: 401 }, (_, i) => centre(i * step))
      const rises = places.slice(1).map((now, i) => now - (places[i] ?? 0))
      expect(Math.min(...rises)).toBeGreaterThan(-1e-9 * lengthMm)
      expect(Math.max(...rises)).toBeLessThanOrEqual(steepest)
      expect(lengthMm - centre(spring.totalCoils)).toBeCloseTo(centre(0), 8)
    }), { numRuns: 300 })
  })
})

describe('what can be drawn', () => {
  it('refuses sizes that are not positive numbers, coils that do not fit and a free length under the solid one', () => {
    expect(isDrawable(demoSpring)).toBe(true)
    for (const wrong of [
      { wireDiameterMm: 0 }, { wireDiameterMm: Number.NaN }, { wireDiameterMm: 25 }, { meanDiameterMm: Infinity }, { activeCoils: -3 },
      { totalCoils: 8 }, { totalCoils: 1e9, activeCoils: 1e9 - 2 }, { freeLengthMm: 25 },
    ]) expect(isDrawable({ ...demoSpring, ...wrong })).toBe(false)
  })
})
