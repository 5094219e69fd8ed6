import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { DISPLAY_UNITS, MPA_PER_PSI, N_PER_LBF, N_PER_MM_PER_LBF_PER_INCH, fromSi, toSi, type Quantity, type UnitSystem } from '#shared/units/convert'

describe('converting between SI and what is shown', () => {
  it('takes the pound-force from the pound and the standard acceleration, both exact by definition', () => {
    expect(N_PER_LBF).toBeCloseTo(0.45359237 * 9.80665, 13)
  })

  it('agrees with the published factors of rate and stress', () => {
    // 1 lbf/in = 0.1751268 N/mm, 1 psi = 6.894757 kPa: NIST SP 811, appendix B, from memory
    expect(N_PER_MM_PER_LBF_PER_INCH).toBeCloseTo(0.1751268, 7)
    expect(MPA_PER_PSI).toBeCloseTo(0.006894757, 9)
  })

  it('reads the fixed points of temperature', () => {
    expect(fromSi(100, 'temperature', 'inch')).toBeCloseTo(212, 10)
    expect(fromSi(-40, 'temperature', 'inch')).toBeCloseTo(-40, 10)
    expect(toSi(32, 'temperature', 'inch')).toBeCloseTo(0, 10)
  })

  it('comes back to the same value in every quantity and system', () => {
    const quantities = Object.keys(DISPLAY_UNITS.metric) as Quantity[]
    fc.assert(fc.property(
      fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.constantFrom(...quantities), fc.constantFrom<UnitSystem>('metric', 'inch'),
      (value, quantity, units) => {
        expect(Math.abs(toSi(fromSi(value, quantity, units), quantity, units) - value)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(value)))
      },
    ))
  })
})
