import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { rateFromOscillation } from '#shared/spring/oscillation'

const taps = (frequencyHz: number, count: number, scatterS: (i: number) => number = () => 0) => Array.from({ length: count }, (_, i) => i / frequencyHz + scatterS(i))

describe('rate from a bouncing mass', () => {
  it('is near 217 N/m for 0.22 kg at 5 Hz (common practice, no source)', () => {
    const result = rateFromOscillation({ tapTimesS: taps(5, 20), massG: 220 })
    expect(result.ok && result.rateNPerMm * 1000).toBeCloseTo(217.1, 1)
    expect(result.ok && result.relativeError).toBeLessThan(1e-9)
  })

  it('takes the times between taps as well as the taps', () => {
    const tapTimesS = taps(3, 15, i => 0.01 * Math.sin(5 * i))
    const periodsS = tapTimesS.slice(1).map((time, i) => time - (tapTimesS[i] ?? 0))
    const byTaps = rateFromOscillation({ tapTimesS, massG: 300, springMassG: 20 })
    const byPeriods = rateFromOscillation({ periodsS, massG: 300, springMassG: 20 })
    expect(byPeriods).toMatchObject({ ok: true, taps: 15 })
    expect(byPeriods.ok && byTaps.ok && byPeriods.rateNPerMm / byTaps.rateNPerMm).toBeCloseTo(1, 12)
    expect(byPeriods.ok && byTaps.ok && byPeriods.relativeError / byTaps.relativeError).toBeCloseTo(1, 9)
    expect(rateFromOscillation({ periodsS: [0.2, 0.2, -0.1, 0.2, 0.2, 0.2, 0.2], massG: 300 })).toEqual({ ok: false, reason: 'not-in-order' })
    expect(rateFromOscillation({ periodsS: [], massG: 300 })).toEqual({ ok: false, reason: 'too-few-taps' })
  })

  it('counts a third of the spring\'s own mass: (2 pi f)^2 (m + ms/3)', () => {
    const result = rateFromOscillation({ tapTimesS: taps(2, 12), massG: 1000, springMassG: 90 })
    expect(result.ok && result.rateNPerMm).toBeCloseTo(((2 * Math.PI * 2) ** 2 * 1.03) / 1000, 9)
  })

  it('tells the error from the scatter: about what many made trials really miss by', () => {
    let within = 0
    let trials = 0
    fc.assert(fc.property(fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 24, maxLength: 24 }), fc.double({ min: 1, max: 4, noNaN: true }), (noise, frequency) => {
      const result = rateFromOscillation({ tapTimesS: taps(frequency, 24, i => 0.03 * (noise[i] ?? 0)), massG: 500 })
      if (!result.ok) return
      trials++
      const truth = ((2 * Math.PI * frequency) ** 2 * 0.5) / 1000
      if (Math.abs(result.rateNPerMm - truth) < 2.5 * result.standardErrorNPerMm) within++
    }), { numRuns: 300, seed: 5 })
    expect(within / trials).toBeGreaterThan(0.9)
  })

  it('sees a tap that was missed, and does without too few, no mass, or a clock that ran back', () => {
    const missed = taps(3, 14).filter((_, i) => i !== 6)
    expect(rateFromOscillation({ tapTimesS: missed, massG: 100 })).toMatchObject({ ok: true, isIrregular: true })
    expect(rateFromOscillation({ tapTimesS: taps(3, 14), massG: 100 })).toMatchObject({ ok: true, isIrregular: false })
    expect(rateFromOscillation({ tapTimesS: taps(3, 7), massG: 100 })).toEqual({ ok: false, reason: 'too-few-taps' })
    expect(rateFromOscillation({ tapTimesS: taps(3, 9), massG: 0 })).toEqual({ ok: false, reason: 'no-mass' })
    expect(rateFromOscillation({ tapTimesS: [...taps(3, 9), 0.1], massG: 10 })).toEqual({ ok: false, reason: 'not-in-order' })
  })
})
