import { describe, expect, it } from 'vitest'
import { impliedRateAndFreeLength, resolveRequirement } from '#shared/spring'

describe('requirement forms', () => {
  it('turns two loads into two points, in order even when entered the other way round', () => {
    const points = [{ lengthMm: 40, forceN: 50 }, { lengthMm: 30, forceN: 100 }]
    const forward = resolveRequirement({ form: 'two-loads', length1Mm: 40, force1N: 50, length2Mm: 30, force2N: 100 })
    const backward = resolveRequirement({ form: 'two-loads', length1Mm: 30, force1N: 100, length2Mm: 40, force2N: 50 })
    expect(forward).toEqual({ ok: true, requirement: { points } })
    expect(backward).toEqual(forward)
    expect(impliedRateAndFreeLength({ points })).toEqual({ rateNPerMm: 5, freeLengthMm: 50 })
  })

  it('turns a load and a rate, and a rate and a free length with or without a shortest length', () => {
    expect(resolveRequirement({ form: 'load-and-rate', lengthMm: 40, forceN: 50, rateNPerMm: 5 }))
      .toEqual({ ok: true, requirement: { points: [{ lengthMm: 40, forceN: 50 }], rateNPerMm: 5 } })
    expect(resolveRequirement({ form: 'rate-and-free-length', rateNPerMm: 5, freeLengthMm: 50 }))
      .toEqual({ ok: true, requirement: { points: [], rateNPerMm: 5, freeLengthMm: 50 } })
    const withShortest = resolveRequirement({ form: 'rate-and-free-length', rateNPerMm: 5, freeLengthMm: 50, shortestLengthMm: 30 })
    expect(withShortest).toEqual({ ok: true, requirement: { points: [{ lengthMm: 30, forceN: 100 }], freeLengthMm: 50 } })
    expect(impliedRateAndFreeLength({ points: [{ lengthMm: 30, forceN: 100 }], freeLengthMm: 50 })).toEqual({ rateNPerMm: 5, freeLengthMm: 50 })
    expect(impliedRateAndFreeLength({ points: [{ lengthMm: 30, forceN: 100 }] })).toBeNull()
  })

  it('says what is missing or impossible beside each field', () => {
    const errors = (r: ReturnType<typeof resolveRequirement>) => (r.ok ? [] : r.errors.map(e => [e.field, e.message]))
    expect(errors(resolveRequirement({ form: 'two-loads', length1Mm: null, force1N: 50, length2Mm: 0, force2N: Number.NaN }))).toEqual([
      ['length1Mm', 'Enter the first length.'],
      ['length2Mm', 'The second length must be more than zero.'],
      ['force2N', 'The second force must be a number.'],
    ])
    expect(errors(resolveRequirement({ form: 'two-loads', length1Mm: 40, force1N: 100, length2Mm: 30, force2N: 50 })).map(e => e[0])).toEqual(['force2N'])
    expect(errors(resolveRequirement({ form: 'two-loads', length1Mm: 30, force1N: 50, length2Mm: 30, force2N: 90 })).map(e => e[0])).toEqual(['length2Mm'])
    expect(errors(resolveRequirement({ form: 'rate-and-free-length', rateNPerMm: 5, freeLengthMm: 50, shortestLengthMm: 55 })).map(e => e[0])).toEqual(['shortestLengthMm'])
  })
})
