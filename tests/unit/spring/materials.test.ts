import { describe, expect, it } from 'vitest'
import {
  MATERIAL_CODES, getMaterial, isMaterialCode, listMaterials, minimumTensileStrengthMpa, modulusMpa, standardDiametersMm,
  wireDiameterToleranceMm,
} from '#shared/spring'
import { EN_CODES } from './springs'

describe('materials', () => {
  it('lists one material for each code, in their order', () => {
    expect(listMaterials().map(m => m.code)).toEqual([...MATERIAL_CODES])
    expect(isMaterialCode('EN10270-1-SH')).toBe(true)
    expect(isMaterialCode('toString')).toBe(false)
  })

  it('names a source for every value', () => {
    for (const m of listMaterials()) {
      for (const value of [m.youngsModulus, m.shearModulus, m.densityKgPerM3, m.temperatureLimitC, m.strength, m.stressRelief, m.modulusLossPerKelvin]) {
        expect(value.source, m.code).not.toBe('')
      }
    }
  })

  it('says why a diameter has no strength instead of extrapolating', () => {
    for (const m of listMaterials()) {
      const { min, max } = m.strength.rangeMm
      for (const d of [min * 0.999, max * 1.001, Number.NaN]) {
        const result = minimumTensileStrengthMpa(m, d)
        expect(result.known, `${m.code} ${d}`).toBe(false)
        if (!result.known) expect(result.reason).toContain(m.standard)
      }
      expect(minimumTensileStrengthMpa(m, min).known).toBe(true)
      expect(minimumTensileStrengthMpa(m, max).known).toBe(true)
    }
  })

  it('never gives a thicker wire of a material much more strength than a thinner one', () => {
    // EN 10270-1 is rounded to 10 MPa and printed rows lie within 10 MPa of its formula. The inch bands of 302 meet within 3 %.
    for (const m of listMaterials()) {
      const { min, max } = m.strength.rangeMm
      let last = Infinity
      for (let i = 0; i <= 400; i++) {
        const d = min * (max / min) ** (i / 400)
        const Rm = m.strength.minimumMpa(d)
        expect(Rm, `${m.code} ${d}`).toBeLessThanOrEqual(last * (m.code === 'ASTM-A313-302' ? 1.03 : 1) + 20)
        last = Rm
      }
    }
  })

  it('takes moduli of ASTM wire by thickness (Shigley, Table 10-5)', () => {
    const { shearModulus } = getMaterial('ASTM-A228')
    expect([0.5, 1, 2, 5].map(d => modulusMpa(shearModulus, d))).toEqual([82_700, 81_700, 81_000, 80_000])
  })

  it('sells at least 60 diameters of the five EN materials, each within the data of its material', () => {
    const all = EN_CODES.flatMap(code => standardDiametersMm(code).map(d => ({ code, d })))
    expect(new Set(all.map(({ d }) => d)).size).toBeGreaterThanOrEqual(60)
    for (const { code, d } of all) expect(minimumTensileStrengthMpa(getMaterial(code), d).known, `${code} ${d}`).toBe(true)
    for (const code of EN_CODES) {
      const sizes = standardDiametersMm(code)
      expect([...sizes].sort((a, b) => a - b)).toEqual(sizes)
    }
  })

  it('gives wire a tolerance: published rows to 0.5 mm, then the square root rule', () => {
    expect(wireDiameterToleranceMm(0.2)).toBe(0.005)
    expect(wireDiameterToleranceMm(0.5)).toBe(0.008)
    expect(wireDiameterToleranceMm(4)).toBe(0.03)
  })
})
