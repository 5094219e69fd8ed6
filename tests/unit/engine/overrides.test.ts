import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { applyOverrides, priceQuantity, PriceError, type OverriddenPrice, type PriceLineCode } from '#server/engine/pricing'
import { isBelowFloor } from '#server/engine/pricing/totals'
import { aBook, aRequest } from './factories'

const priced = priceQuantity(aRequest())
const lineOf = (price: OverriddenPrice, code: PriceLineCode) => {
  const line = price.lines.find((candidate) => candidate.code === code)
  if (!line) throw new Error(`no line ${code}`)
  return line
}
const computedOf = (code: PriceLineCode) => priced.lines.find((line) => line.code === code)?.amountMinor ?? Number.NaN
const codeOf = (act: () => unknown) => {
  try {
    act()
  } catch (error) {
    if (error instanceof PriceError) return error.code
    throw error
  }
  return undefined
}

describe('an estimator’s changes', () => {
  it('change nothing where there are none', () => {
    const same = applyOverrides(priced, [])
    expect(same).toMatchObject({ netMinor: priced.netMinor, computedNetMinor: priced.netMinor, unitPrice: priced.unitPrice, grossMinor: priced.grossMinor })
    for (const line of same.lines) expect([line.computedAmountMinor, line.overrideReason]).toEqual([line.amountMinor, null])
  })

  it('keep the computed amount beside and work overhead, risk and margin out again', () => {
    const changed = applyOverrides(priced, [{ lineCode: 'coiling-set-up', amountMinor: 17_550, reason: ' Second arbor ', basis: '3.25 h at C4' }])
    expect(lineOf(changed, 'coiling-set-up')).toMatchObject({
      amountMinor: 17_550, computedAmountMinor: computedOf('coiling-set-up'), overrideReason: 'Second arbor', basis: '3.25 h at C4',
    })
    const costMinor = priced.costMinor - computedOf('coiling-set-up') + 17_550
    expect(changed.costMinor).toBe(costMinor)
    // 12 % and 4 % of cost are the default policies.
    expect(lineOf(changed, 'overhead')).toMatchObject({ amountMinor: Math.round(costMinor * 0.12), computedAmountMinor: computedOf('overhead'), overrideReason: null })
    expect(lineOf(changed, 'risk').amountMinor).toBe(Math.round(costMinor * 0.04))
    expect(Number(changed.marginPercent)).toBeCloseTo(24, 0)
    expect(changed.computedNetMinor).toBe(priced.netMinor)
    expect(changed.lines.reduce((sum, line) => sum + line.amountMinor, 0)).toBe(changed.netMinor)
  })

  it('leave overhead as set when it is itself set', () => {
    const changed = applyOverrides(priced, [
      { lineCode: 'wire', amountMinor: 9999, reason: 'quoted by the mill' },
      { lineCode: 'overhead', amountMinor: 100, reason: 'agreed' },
    ])
    expect(lineOf(changed, 'overhead').amountMinor).toBe(100)
  })

  it('take another margin as a percentage of price, and say when it is below the floor of 15 %', () => {
    const low = applyOverrides(priced, [], { percent: '10', reason: 'first order of a large customer' })
    const base = priced.netMinor - computedOf('margin')
    expect(low.netMinor).toBeGreaterThanOrEqual(Math.round(base / 0.9))
    expect(low.netMinor).toBeLessThanOrEqual(Math.round(base / 0.9) + 51)
    expect(low.isBelowMarginFloor).toBe(true)
    expect(lineOf(low, 'margin')).toMatchObject({ rate: '10', overrideReason: 'first order of a large customer', computedAmountMinor: computedOf('margin') })
    expect(applyOverrides(priced, [], { percent: '15', reason: 'at the floor' }).isBelowMarginFloor).toBe(false)
    expect(applyOverrides(priced, [], { percent: '14.5', reason: 'under it' }).isBelowMarginFloor).toBe(true)
  })

  it('do not call the rounding of the price a breach of the floor', () => {
    const at = (marginMinor: number, netMinor: number) => isBelowFloor({ marginMinor, netMinor, floorPercent: '15', currency: 'eur' })
    expect([at(1500, 10_000), at(1499, 10_000), at(1500, 10_006)]).toEqual([false, true, false])
  })

  it('take a margin amount to the cent', () => {
    const changed = applyOverrides(priced, [{ lineCode: 'margin', amountMinor: 1, reason: 'as agreed' }])
    expect(changed.netMinor).toBe(priced.netMinor - computedOf('margin') + 1)
    expect(changed.isBelowMarginFloor).toBe(true)
  })

  it('let a named margin stand under the smallest order', () => {
    const small = priceQuantity(aRequest({ quantity: 1, book: aBook({ 'policy.minimum-order': '900' }) }))
    expect(small.netMinor).toBe(90_000)
    expect(applyOverrides(small, [{ lineCode: 'wire', amountMinor: 1, reason: 'left over' }]).netMinor).toBe(90_000)
    expect(applyOverrides(small, [], { percent: '24', reason: 'a favour' }).netMinor).toBeLessThan(90_000)
  })

  it('always add up, with tax and with the floor judged on the price that results', () => {
    const amounts = fc.record({ wire: fc.integer({ min: 0, max: 1e6 }), packing: fc.integer({ min: 0, max: 1e6 }), margin: fc.integer({ min: 0, max: 90 }) })
    fc.assert(fc.property(amounts, ({ wire, packing, margin }) => {
      const changed = applyOverrides(priced, [
        { lineCode: 'wire', amountMinor: wire, reason: 'a' }, { lineCode: 'packing', amountMinor: packing, reason: 'b' },
      ], { percent: String(margin), reason: 'c' })
      expect(changed.lines.reduce((sum, line) => sum + line.amountMinor, 0)).toBe(changed.netMinor)
      expect(changed.grossMinor).toBe(changed.netMinor + changed.taxMinor)
      expect(changed.taxMinor).toBe(Math.floor((changed.netMinor * 20 + 50) / 100))
      if (margin >= 15) expect(changed.isBelowMarginFloor).toBe(false)
    }))
  })

  it('need a reason, a line that exists, an amount that can be paid, and one voice on margin', () => {
    expect(codeOf(() => applyOverrides(priced, [{ lineCode: 'wire', amountMinor: 1, reason: '  ' }]))).toBe('reason-missing')
    expect(codeOf(() => applyOverrides(priced, [{ lineCode: 'certificate', amountMinor: 1, reason: 'x' }]))).toBe('line-unknown')
    expect(codeOf(() => applyOverrides(priced, [{ lineCode: 'wire', amountMinor: -1, reason: 'x' }]))).toBe('override-unreadable')
    const twice = { lineCode: 'wire' as const, amountMinor: 1, reason: 'x' }
    expect(codeOf(() => applyOverrides(priced, [twice, twice]))).toBe('override-unreadable')
    expect(codeOf(() => applyOverrides(priced, [], { percent: '20', reason: '' }))).toBe('reason-missing')
    for (const percent of ['96', 'abc', '-101', '1e1']) {
      expect(codeOf(() => applyOverrides(priced, [], { percent, reason: 'x' })), percent).toBe('override-unreadable')
    }
    expect(codeOf(() => applyOverrides(priced, [{ lineCode: 'margin', amountMinor: 1, reason: 'x' }], { percent: '20', reason: 'x' }))).toBe('override-unreadable')
    expect(codeOf(() => applyOverrides(priced, [{ lineCode: 'margin', amountMinor: -9_999_999, reason: 'x' }]))).toBe('price-negative')
  })
})
