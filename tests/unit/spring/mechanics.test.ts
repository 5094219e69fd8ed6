import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  activeCoilsFor, activeCoilsForRate, bergstraesserFactor, criticalBucklingDeflectionMm, directShearFactor, growthAtSolidMm,
  growthPitchMm, lifeFraction, meanDiameterToleranceMm, minimumClearanceMm, modulusAtTemperatureMpa, naturalFrequencyHz,
  outerDiameterAtSolidFixedEndsMm, pitchMm, rateNPerMm, shearStressMpa, solidLengthMm, staticLimit, totalCoilsFor,
  wahlFactor, wireLengthMm, wireMassG,
} from '#shared/spring'

const dims = {
  wireDiameterMm: fc.double({ min: 0.1, max: 16, noNaN: true }),
  index: fc.double({ min: 4, max: 20, noNaN: true }),
  activeCoils: fc.double({ min: 2, max: 50, noNaN: true }),
}

describe('rate and stress', () => {
  it('gives 4.974 N/mm for 2 mm wire on 16 mm, 8 coils, G 81 500', () => {
    // 81 500 x 16 / (8 x 4096 x 8)
    expect(rateNPerMm({ shearModulusMpa: 81_500, wireDiameterMm: 2, meanDiameterMm: 16, activeCoils: 8 })).toBeCloseTo(1_304_000 / 262_144, 12)
    expect(shearStressMpa(100, 16, 2)).toBeCloseTo(12_800 / (8 * Math.PI), 10)
  })

  it('falls with the coils and the cube of the diameter and rises with the fourth power of the wire', () => {
    fc.assert(fc.property(dims.wireDiameterMm, dims.index, dims.activeCoils, fc.double({ min: 1.01, max: 3, noNaN: true }), (d, w, n, f) => {
      const at = (wire: number, mean: number, coils: number) =>
        rateNPerMm({ shearModulusMpa: 80_000, wireDiameterMm: wire, meanDiameterMm: mean, activeCoils: coils })
      const rate = at(d, d * w, n)
      expect(at(d, d * w, n * f) / rate).toBeCloseTo(1 / f, 9)
      expect(at(d, d * w * f, n) / rate).toBeCloseTo(f ** -3, 9)
      expect(at(d * f, d * w, n) / rate).toBeCloseTo(f ** 4, 6)
      // Twice as large in every length: twice as stiff.
      expect(at(f * d, f * d * w, n) / rate).toBeCloseTo(f, 9)
      expect(activeCoilsForRate({ shearModulusMpa: 80_000, wireDiameterMm: d, meanDiameterMm: d * w, rateNPerMm: rate })).toBeCloseTo(n, 9)
    }))
  })

  it('has EN and Bergstraesser factors that are one, and Wahl within 1.4 % of them from index 4', () => {
    fc.assert(fc.property(dims.index, (w) => {
      expect(bergstraesserFactor(w)).toBeCloseTo((4 * w + 2) / (4 * w - 3), 12)
      const gap = (wahlFactor(w) - bergstraesserFactor(w)) / wahlFactor(w)
      expect(gap).toBeGreaterThan(0)
      expect(gap).toBeLessThan(0.0137)
      expect(directShearFactor(w)).toBeLessThan(bergstraesserFactor(w))
    }))
  })
})

describe('ends and lengths', () => {
  it('counts coils and solid length of the four ends in both conventions', () => {
    // Shigley Table 10-1; EN 13906-1 for closed ends.
    expect(totalCoilsFor('closed-ground', 8)).toBe(10)
    expect(totalCoilsFor('closed', 8)).toBe(10)
    expect(totalCoilsFor('open', 8)).toBe(8)
    expect(totalCoilsFor('open-ground', 8)).toBe(9)
    expect(solidLengthMm('textbook', 'closed-ground', 10, 2)).toBe(20)
    expect(solidLengthMm('textbook', 'closed', 10, 2)).toBe(22)
    expect(solidLengthMm('textbook', 'open', 8, 2)).toBe(18)
    expect(solidLengthMm('textbook', 'open-ground', 9, 2)).toBe(18)
    expect(solidLengthMm('en', 'closed-ground', 10, 2.021)).toBeCloseTo(20.21, 12)
    expect(solidLengthMm('en', 'closed', 10, 2)).toBe(23)
    expect(activeCoilsFor('closed', totalCoilsFor('closed', 7.25))).toBe(7.25)
  })

  it('shares the free length out so that coils at a pitch of d lie solid', () => {
    for (const ends of ['closed-ground', 'closed', 'open', 'open-ground'] as const) {
      const activeCoils = 8
      const totalCoils = totalCoilsFor(ends, activeCoils)
      const L0 = solidLengthMm('textbook', ends, totalCoils, 2)
      expect(pitchMm({ ends, freeLengthMm: L0, wireDiameterMm: 2, activeCoils, totalCoils }), ends).toBeCloseTo(2, 12)
    }
  })

  it('measures wire as the helix unrolled and weighs a metre of 2 mm steel at 24.66 g', () => {
    expect(wireLengthMm(16, 8, 10, 0)).toBeCloseTo(10 * Math.PI * 16, 10)
    expect(wireLengthMm(16, 8, 10, 7)).toBeCloseTo(8 * Math.hypot(Math.PI * 16, 7) + 2 * Math.PI * 16, 10)
    expect(wireMassG(2, 1000, 7850)).toBeCloseTo(6.1654 * 4, 2)
  })
})

describe('gaps, growth, buckling, surge, heat', () => {
  it('takes one and a half times the least gaps for dynamic duty', () => {
    expect(minimumClearanceMm(16, 2, 8, false)).toBeCloseTo(8 * (0.0015 * 128 + 0.2), 12)
    expect(minimumClearanceMm(16, 2, 8, true)).toBeCloseTo(1.5 * 8 * 0.392, 12)
  })

  it('grows 0.44 mm with free ends and 0.26 mm with held ends for d 2.5, D 28.5, pitch 12.3', () => {
    // Computed for the reference notes; two decimals there.
    expect(growthAtSolidMm(28.5, 2.5, 12.3)).toBeCloseTo(0.44, 2)
    expect(outerDiameterAtSolidFixedEndsMm(28.5, 2.5, 12.3) - 31).toBeCloseTo(0.26, 2)
    expect(growthPitchMm(false, 60, 2, 8)).toBe(7.25)
    expect(growthPitchMm(true, 60, 2, 8)).toBe(6.875)
  })

  it('grows more with free ends than with held ends at every pitch above the wire', () => {
    fc.assert(fc.property(dims.wireDiameterMm, dims.index, fc.double({ min: 1.001, max: 5, noNaN: true }), (d, w, p) => {
      const D = d * w
      expect(growthAtSolidMm(D, d, p * d)).toBeGreaterThanOrEqual(outerDiameterAtSolidFixedEndsMm(D, d, p * d) - D - d - 1e-12)
    }))
  })

  it('cannot buckle below 2.63 D / seating coefficient and can above it (Shigley ch. 10, steel)', () => {
    // 2.63 belongs to G/E = 11.5/30.
    for (const seatingCoefficient of [0.5, 0.707, 1, 2]) {
      const at = (factor: number) => criticalBucklingDeflectionMm({
        freeLengthMm: (factor * 2.63 * 20) / seatingCoefficient, meanDiameterMm: 20, seatingCoefficient, shearModulusMpa: 79_300, youngsModulusMpa: 206_850,
      })
      expect(at(0.99)).toBe(Infinity)
      expect(at(1.01)).toBeLessThan(Infinity)
      expect(at(1.01)).toBeGreaterThan(0)
    }
  })

  it('stays finite where both moduli are the same', () => {
    const value = criticalBucklingDeflectionMm({ freeLengthMm: 200, meanDiameterMm: 20, seatingCoefficient: 1, shearModulusMpa: 80_000, youngsModulusMpa: 80_000 })
    const near = criticalBucklingDeflectionMm({ freeLengthMm: 200, meanDiameterMm: 20, seatingCoefficient: 1, shearModulusMpa: 80_000, youngsModulusMpa: 80_010 })
    expect(value).toBeCloseTo(near, 2)
  })

  it('has the surge frequency of half the root of rate over active mass', () => {
    const coil = { wireDiameterMm: 2, meanDiameterMm: 16, activeCoils: 8 }
    const rate = rateNPerMm({ shearModulusMpa: 81_500, ...coil })
    const massKg = wireMassG(2, 8 * Math.PI * 16, 7850) / 1000
    const expected = 0.5 * Math.sqrt((rate * 1000) / massKg)
    expect(naturalFrequencyHz({ ...coil, shearModulusMpa: 81_500, densityKgPerM3: 7850 })).toBeCloseTo(expected, 6)
  })

  it('softens by a quarter of a per mille for each kelvin', () => {
    expect(modulusAtTemperatureMpa(81_500, 0.25e-3, 20)).toBe(81_500)
    expect(modulusAtTemperatureMpa(81_500, 0.25e-3, 120)).toBeCloseTo(81_500 * 0.975, 9)
  })
})

describe('limits and tolerances', () => {
  it('allows 0.56 of the strength by EN 13906-1 and Shigley\'s fractions otherwise', () => {
    expect(staticLimit('en13906', 'stainless', false).fractionOfStrength).toBe(0.56)
    expect(staticLimit('en13906', 'stainless', false).stressFactor(8)).toBe(1)
    expect(staticLimit('wahl', 'cold-drawn-carbon', false).fractionOfStrength).toBe(0.45)
    expect(staticLimit('wahl', 'cold-drawn-carbon', false).stressFactor(8)).toBe(wahlFactor(8))
    expect(staticLimit('wahl', 'stainless', true).fractionOfStrength).toBe(0.55)
    expect(staticLimit('wahl', 'tempered-steel', true).stressFactor(8)).toBe(directShearFactor(8))
  })

  it('reads the life fractions at their decades and between them', () => {
    // Handbook values for A228 and 302 wire, from memory.
    expect([1e5, 1e6, 1e7, 1e9].map(n => lifeFraction(n, false))).toEqual([0.36, 0.33, 0.3, 0.3])
    expect(lifeFraction(1e6, true)).toBe(0.39)
    expect(lifeFraction(10 ** 5.5, false)).toBeCloseTo(0.345, 12)
    expect(lifeFraction(5e4, false)).toBeNull()
  })

  it('reads the diameter tolerance of EN 15800 by size, index and grade', () => {
    expect(meanDiameterToleranceMm(16, 8, 2)).toBe(0.3)
    expect(meanDiameterToleranceMm(16.001, 8.001, 2)).toBe(0.45)
    expect(meanDiameterToleranceMm(16, 8, 1)).toBe(0.15)
    expect(meanDiameterToleranceMm(200, 20, 3)).toBe(6.6)
    for (const [D, w] of [[0.5, 8], [201, 8], [16, 3.9], [16, 20.1]] as const) expect(meanDiameterToleranceMm(D, w, 2)).toBeNaN()
  })

  it('never narrows the diameter tolerance as size or index grows', () => {
    fc.assert(fc.property(fc.double({ min: 0.63, max: 200, noNaN: true }), dims.index, fc.double({ min: 1, max: 3, noNaN: true }), fc.constantFrom(1, 2, 3), (D, w, f, grade) => {
      const here = meanDiameterToleranceMm(D, w, grade as 1 | 2 | 3)
      const larger = meanDiameterToleranceMm(Math.min(200, D * f), Math.min(20, w * f), grade as 1 | 2 | 3)
      expect(larger).toBeGreaterThanOrEqual(here)
    }))
  })
})
