import { describe, expect, it } from 'vitest'
import { evaluateExtension } from '#shared/spring'
import { straightWireElongationMm, straightWireLengthMm, straightWireRadiusMm, straightWireRateNPerMm, twistOfOneCoilTurns } from '#shared/spring/straight-wire'

// Common practice, no source: copper, soft, about 110 GPa and 200 N/mm2.
const COPPER_MPA = 110_000
const SOFT_COPPER_MPA = 200

describe('a straight wire as a spring', () => {
  it('stays elastic only to a fraction of a percent', () => {
    expect(straightWireElongationMm({ youngsModulusMpa: COPPER_MPA, stressMpa: SOFT_COPPER_MPA, lengthMm: 100 })).toBeCloseTo(0.18, 2)
  })

  it('of copper must be 0.55 m long to give 1 mm, and 18 micrometres in radius for 200 N/m', () => {
    const lengthMm = straightWireLengthMm({ youngsModulusMpa: COPPER_MPA, stressMpa: SOFT_COPPER_MPA, elongationMm: 1 })
    expect(lengthMm).toBeCloseTo(550, 9)
    const radiusMm = straightWireRadiusMm({ youngsModulusMpa: COPPER_MPA, rateNPerMm: 0.2, lengthMm })
    expect(radiusMm * 1000).toBeCloseTo(17.8, 1)
    expect(straightWireRateNPerMm({ youngsModulusMpa: COPPER_MPA, radiusMm, lengthMm })).toBeCloseTo(0.2, 12)
  })
})

describe('the same wire in a coil', () => {
  const spring = { kind: 'extension', material: 'EN10270-1-SH', wireDiameterMm: 1, meanDiameterMm: 10, bodyCoils: 30, initialTensionN: 4 } as const

  it('twists each coil by only a small part of a turn at the load allowed', () => {
    const { greatestForceN } = evaluateExtension(spring)
    const turns = twistOfOneCoilTurns({ forceN: greatestForceN ?? Number.NaN, meanDiameterMm: 10, shearModulusMpa: 81_500, wireDiameterMm: 1 })
    expect(turns).toBeGreaterThan(0.01)
    expect(turns).toBeLessThan(0.15)
  })

  it('doubles the body of a close-wound spring within the stress allowed', () => {
    const { greatestLengthMm, insideHooksFreeLengthMm, bodyLengthMm } = evaluateExtension(spring)
    expect((greatestLengthMm ?? 0) - insideHooksFreeLengthMm).toBeGreaterThan(bodyLengthMm)
  })
})
