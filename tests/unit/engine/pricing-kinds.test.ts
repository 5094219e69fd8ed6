import { describe, expect, it } from 'vitest'
import { priceQuantity, PriceError, type PriceLineCode, type PricedQuantity, type RateCode } from '#server/engine/pricing'
import { aBook, aDesign, aRequest, aWireProduct } from './factories'

const lineOf = (priced: PricedQuantity, code: PriceLineCode) => {
  const line = priced.lines.find(candidate => candidate.code === code)
  if (!line) throw new Error(`no line ${code}`)
  return line
}
const amounts = (priced: PricedQuantity) => Object.fromEntries(priced.lines.map(({ code, amountMinor }) => [code, amountMinor]))

/** Round rates, so that each figure below can be worked on paper. They are this test's own, not the trade's. */
const paperRates: Partial<Record<RateCode, string>> = {
  'hourly.coiling': '60.00', 'hourly.stress-relief': '20.00', 'hourly.inspection': '40.00', 'coiling.efficiency-percent': '80', 'coiling.setup-factor.grade-2': '1',
  'coiling.setup-hours.light': '1', 'coiling.feed.light': '40', 'coiling.forming-seconds.light': '0.5', 'coiling.cap.light': '100', 'coiling.end-seconds.light': '0.6',
  'coiling.setup-hours.medium': '1.5', 'coiling.feed.medium': '20', 'coiling.forming-seconds.medium': '1', 'coiling.cap.medium': '60', 'coiling.end-seconds.medium': '2.4',
  'coiling.setup-factor.extension': '2', 'coiling.setup-factor.crossover-loop': '1.2', 'coiling.end-factor.crossover-loop': '1.25',
  'coiling.setup-factor.torsion': '2', 'coiling.setup-factor.straight': '1.25', 'coiling.end-factor.straight': '1.5',
  'coiling.index-easy': '6', 'coiling.index-slowing-percent': '10',
  'wire.running-scrap-percent': '2', 'wire.setup-scrap-pieces': '20', 'wire.setup-scrap-metres': '8', 'wire.coil-end-metres': '3',
  'furnace.batch-kg': '10', 'furnace.handling-minutes': '30',
  'inspection.first-off-minutes': '15', 'inspection.minutes-per-measurement': '0.3', 'inspection.aql': '1.0',
  'inspection.measurements-per-spring.extension': '5', 'inspection.measurements-per-spring.torsion': '4',
  'packing.per-order': '12.50', 'packing.per-kg': '0.60', 'packing.minutes-per-order': '15', 'packing.minutes-per-kg': '0.5',
  'policy.overhead-percent': '12', 'policy.risk-percent': '4', 'policy.margin-percent': '25', 'policy.minimum-order': '60', 'tax.domestic-percent': '20',
}

describe('an extension spring worked by hand: 200 of 44 g, 3 mm wire, index 8, crossed loops', () => {
  // 44 g of 800 mm wire: 0.055 kg a metre.
  const design = aDesign({ kind: 'extension', ends: null, formed: 'crossover-loop', wireDiameterMm: 3, meanDiameterMm: 24, wireLengthMm: 800, massG: 44, stressReliefMinutes: 30 })
  const request = aRequest({ design, quantity: 200, book: aBook(paperRates), wireProduct: aWireProduct({ pricePerKg: '3.00', smallestPurchaseKg: '100' }) })
  const priced = priceQuantity(request)

  it('takes wire as any spring does', () => {
    // 200 x 0.044 x 1.02 = 8.976; set-up max(20 x 0.044, 8 x 0.055) = 0.88; one coil end 3 x 0.055 = 0.165: 10.021 kg at 3.00.
    expect(lineOf(priced, 'wire')).toMatchObject({ quantity: '10.021', amountMinor: 3006 })
  })

  it('sets the coiler up for hooks of this form', () => {
    // 1.5 h x 2 for hooks x 1.2 for crossed loops = 3.6 h at 60.
    expect(lineOf(priced, 'coiling-set-up')).toMatchObject({ quantity: '3.6000', amountMinor: 21_600, basis: '3.60\u202Fh, tolerance grade 2, crossed loops' })
  })

  it('runs for the feed, the cut-off and both loops', () => {
    // 0.8 m at 20 m/min is 2.4 s, cut-off 1 s, two loops 2 x 2.4 x 1.25 = 6 s: 9.4 s. 204 x 9.4 / 3600 / 0.8 = 0.665833 h; 0.6658 x 60 = 39.948.
    expect(lineOf(priced, 'coiling-run')).toMatchObject({ quantity: '0.6658', amountMinor: 3995, basis: '204 pieces with 2 crossed loops each, 0.67\u202Fh' })
  })

  it('relieves one batch, grinds nothing, and measures more on each spring', () => {
    // 204 x 0.044 = 8.976 kg: one batch of 30 + 30 min.
    expect(lineOf(priced, 'stress-relief')).toMatchObject({ quantity: '1.0000', amountMinor: 2000 })
    expect(amounts(priced)).not.toHaveProperty('end-grinding')
    // ISO 2859-1 II, lot 151-280, AQL 1.0: the arrow leads to 50 springs. 15 + 50 x 5 x 0.3 = 90 min at 40.
    expect(priced.sampleSize).toBe(50)
    expect(lineOf(priced, 'inspection')).toMatchObject({ quantity: '1.5000', amountMinor: 6000, basis: 'first-off and 50 springs, 5 measurements each, 1.50\u202Fh' })
    // 12.50 + 8.8 x 0.60.
    expect(lineOf(priced, 'packing').amountMinor).toBe(1778)
  })

  it('comes to 2.968 each', () => {
    // Cost 383.79: 12 % is 46.0548, 4 % is 15.3516. 445.19 / 0.75 = 593.5867; each 2.96793, up to 2.968.
    expect(priced.costMinor).toBe(3006 + 21_600 + 3995 + 2000 + 6000 + 1778)
    expect(amounts(priced)).toMatchObject({ overhead: 4605, risk: 1535, margin: 14_841 })
    expect(priced).toMatchObject({ unitPrice: '2.968', netMinor: 59_360, taxMinor: 11_872, grossMinor: 71_232 })
  })

  it('plans coiling with its hooks as one operation', () => {
    // 0.665833 h is 39.95 min; packing 15 + 0.5 x 8.8 = 19.4.
    expect(priced.plannedMinutes).toEqual({
      'coiling': { setUpMinutes: 216, runMinutes: 40 }, 'stress-relief': { setUpMinutes: 0, runMinutes: 60 },
      'inspection': { setUpMinutes: 15, runMinutes: 75 }, 'packing': { setUpMinutes: 0, runMinutes: 20 },
    })
  })
})

describe('a torsion spring worked by hand: 1000 of 4.2 g, 1.5 mm wire, index 4, legs along the axis', () => {
  // 4.2 g of 300 mm wire: 0.014 kg a metre.
  const design = aDesign({ kind: 'torsion', ends: null, formed: 'straight', wireDiameterMm: 1.5, meanDiameterMm: 6, wireLengthMm: 300, massG: 4.2, stressReliefMinutes: 20 })
  const request = aRequest({ design, quantity: 1000, book: aBook(paperRates), wireProduct: aWireProduct({ pricePerKg: '5.00', smallestPurchaseKg: '15' }) })
  const priced = priceQuantity(request)

  it('takes wire by the metres scrapped in set-up, as the springs are small', () => {
    // 1000 x 0.0042 x 1.02 = 4.284; set-up max(20 x 0.0042, 8 x 0.014) = 0.112; one coil end 3 x 0.014 = 0.042: 4.438 kg at 5.00.
    expect(lineOf(priced, 'wire')).toMatchObject({ quantity: '4.438', amountMinor: 2219 })
  })

  it('sets up for legs, and feeds slower for the tight index', () => {
    // 1 h x 2 for legs x 1.25 for legs along the axis = 2.5 h at 60.
    expect(lineOf(priced, 'coiling-set-up')).toMatchObject({ quantity: '2.5000', amountMinor: 15_000 })
    // 0.3 m at 40 m/min is 0.45 s, two units of index under 6 make it 0.54 s; cut-off 0.5 s, two legs 2 x 0.6 x 1.5 = 1.8 s: 2.84 s.
    // 1020 x 2.84 / 3600 / 0.8 = 1.005833 h; 1.0058 x 60 = 60.348.
    expect(lineOf(priced, 'coiling-run')).toMatchObject({ quantity: '1.0058', amountMinor: 6035, basis: '1\u202F020 pieces with 2 legs along the axis each, tight at index 4.0, 1.01\u202Fh' })
  })

  it('comes to 0.524 each', () => {
    // One batch of 20 + 30 min, 0.8333 h at 20. Lot 501-1200: 80 springs; 15 + 80 x 4 x 0.3 = 111 min, 1.85 h at 40. Packing 12.50 + 4.2 x 0.60.
    expect(amounts(priced)).toMatchObject({ 'stress-relief': 1667, 'inspection': 7400, 'packing': 1502 })
    // Cost 338.23: 40.5876 and 13.5292. 392.35 / 0.75 = 523.1333; each 0.523133, up to 0.524.
    expect(priced.costMinor).toBe(2219 + 15_000 + 6035 + 1667 + 7400 + 1502)
    expect(amounts(priced)).toMatchObject({ overhead: 4059, risk: 1353, margin: 13_165 })
    expect(priced).toMatchObject({ unitPrice: '0.524', netMinor: 52_400, taxMinor: 10_480, grossMinor: 62_880 })
  })

  it('is held to the coiler’s most springs a minute, whatever its legs take', () => {
    const capped = priceQuantity({ ...request, book: aBook({ ...paperRates, 'coiling.cap.light': '10' }) })
    // 1020 / 10 / 60 / 0.8 = 2.125 h at 60.
    expect(lineOf(capped, 'coiling-run').amountMinor).toBe(12_750)
  })

  it('forms nothing where it has no legs', () => {
    const bare = priceQuantity({ ...request, design: { ...design, formed: null } })
    // 0.54 + 0.5 s: 1020 x 1.04 / 3600 / 0.8 = 0.368333 h; 0.3683 x 60 = 22.098. Set-up 1 h x 2.
    expect(amounts(bare)).toMatchObject({ 'coiling-set-up': 12_000, 'coiling-run': 2210 })
    expect(lineOf(bare, 'coiling-run').basis).toBe('1\u202F020 pieces, tight at index 4.0, 0.37\u202Fh')
  })
})

describe('kinds and ends', () => {
  const price = (changes: Parameters<typeof aDesign>[0]) => () => priceQuantity(aRequest({ design: aDesign(changes), book: aBook(paperRates) }))
  it('refuses hooks on a spring that is pressed, and ground ends on others', () => {
    expect(price({ formed: 'full-loop' })).toThrow(PriceError)
    expect(price({ kind: 'extension', formed: 'full-loop' })).toThrow(PriceError)
    expect(price({ kind: 'torsion', formed: 'straight', ends: 'closed' })).toThrow(PriceError)
    expect(price({ kind: 'torsion', formed: 'straight', ends: null })).not.toThrow()
  })

  // Common trade practice has springs with loops or legs come off at a third of the pace of plain ones: 0.25 to 0.45 is near it.
  it.each([[0.4, 4], [1.2, 9], [3, 24], [8, 64]])('coils a spring of %s mm wire with loops at about a third of the pace of a plain one, by the rates a shop starts with', (wireDiameterMm, meanDiameterMm) => {
    const massG = 0.00617 * wireDiameterMm ** 2 * 500
    const hours = (kind: 'compression' | 'extension') => Number(lineOf(priceQuantity(aRequest({
      quantity: 10_000, design: aDesign({ kind, ends: kind === 'compression' ? 'closed' : null, formed: kind === 'compression' ? null : 'full-loop', wireDiameterMm, meanDiameterMm, wireLengthMm: 500, massG }),
    })), 'coiling-run').quantity)
    expect(hours('compression') / hours('extension')).toBeGreaterThan(0.25)
    expect(hours('compression') / hours('extension')).toBeLessThan(0.45)
  })
})
