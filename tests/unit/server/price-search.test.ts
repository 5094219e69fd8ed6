import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { requirementSchema, type Requirement } from '#shared/schemas/enquiry'
import { MATERIAL_CODES, searchWires, standardDiametersMm, type SizingCandidate } from '#shared/spring'
import type { CatalogueWire } from '#server/services/catalogue/list-wires'
import { buildDefaultRates, type PriceBook } from '#server/engine/pricing'
import { priceOptionsOf, priceSearchOf } from '#server/services/springs/price-search'
import { sizeRequestOf } from '#server/services/springs/requirement'
import { searchDesign } from '#server/services/springs/search-design'
import { readGatePolicy } from '#server/engine/gate'
import { isUsualSpring } from '#server/services/springs/usual-spring'

const book: PriceBook = { number: 1, currency: 'eur', inForceFrom: '2026-01-01', rates: buildDefaultRates() }
// Some kept, some lying there by chance, some to be bought, at different prices.
const wires: CatalogueWire[] = MATERIAL_CODES.flatMap(material => standardDiametersMm(material).map((d, i) => ({
  id: `${material} ${d}`, material, wireDiameterMm: d, currency: 'eur', pricePerKg: (2 + (i % 7) * 1.3).toFixed(2), stockKg: i % 3 === 0 ? '100' : '0', smallestPurchaseKg: i % 2 ? '25' : '5', leadDays: 5, stocked: i % 3 === 0,
})))

// Asking about every stepped spring of every wire takes long: enough of them for that, thick and thin.
const fewWires = wires.filter(({ wireDiameterMm: d }, i) => i % 6 === 0 && d >= 0.6 && d <= 2.6)

const common = { couldHurt: 'no', toleranceGrade: 2 } as const
const between = (low: number, high: number) => fc.integer({ min: 0, max: 1000 }).map(i => low + ((high - low) * i) / 1000)
const quantities = fc.constantFrom([1], [50], [100, 1000], [20_000])
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: undefined })
const requirements: Readonly<Record<Requirement['kind'], fc.Arbitrary<Requirement>>> = {
  compression: fc.record({ L: between(15, 50), travel: between(3, 30), F: between(2, 150), more: between(5, 200), boreMm: maybe(between(8, 40)), ends: fc.constantFrom('closed-ground', 'closed'), quantities })
    .map(({ L, travel, F, more, ...rest }) => requirementSchema.parse({ kind: 'compression', need: { knows: 'two-loads', first: { lengthMm: L + travel, forceN: F }, second: { lengthMm: L, forceN: F + more } }, ...rest, ...common })),
  extension: fc.record({ L: between(30, 90), travel: between(5, 40), F: between(2, 30), more: between(3, 60), boreMm: maybe(between(8, 40)), quantities })
    .map(({ L, travel, F, more, ...rest }) => requirementSchema.parse({ kind: 'extension', need: { knows: 'two-loads', first: { lengthMm: L, forceN: F }, second: { lengthMm: L + travel, forceN: F + more } }, ...rest, ...common })),
  torsion: fc.record({ a: between(5, 60), turn: between(20, 180), M: between(20, 500), more: between(50, 2000), rodMm: maybe(between(3, 15)), quantities })
    .map(({ a, turn, M, more, ...rest }) => requirementSchema.parse({ kind: 'torsion', need: { knows: 'two-moments', first: { angleDeg: a, momentNmm: M }, second: { angleDeg: a + turn, momentNmm: M + more } }, firstLegMm: 25, secondLegMm: 25, ...rest, ...common })),
}

function priceOf(requirement: Requirement) {
  const request = sizeRequestOf(requirement, 3)
  return { request, price: priceSearchOf({ book, quantity: requirement.quantities[0] ?? 1, options: priceOptionsOf(requirement), request }) }
}

describe.each(['compression', 'extension', 'torsion'] as const)('the price of a %s spring as the search takes it', (kind) => {
  it('never falls as the spring gets heavier, and its bound lies under every spring of at least the mass', () => {
    fc.assert(fc.property(requirements[kind], fc.constantFrom(...wires), between(0.05, 400), between(0.05, 400), (requirement, wire, m, n) => {
      const { price } = priceOf(requirement)
      const [light, heavy] = [Math.min(m, n), Math.max(m, n)]
      expect(price.leastOfMass(wire, light)).toBeLessThanOrEqual(price.leastOfMass(wire, heavy) * (1 + 1e-12))
    }), { numRuns: 300 })
  })

  it('gives the same springs whether wires are left out by it or every spring is asked about', () => {
    let found = 0
    fc.assert(fc.property(requirements[kind], (requirement) => {
      const { request, price } = priceOf(requirement)
      const all = searchWires(request, fewWires, { objective: price.objective })
      const some = searchWires(request, fewWires, price)
      expect(some.searched).toEqual(all.searched)
      expect(some.designs.map(design => design.wireId)).toEqual(all.designs.map(design => design.wireId))
      some.designs.forEach(({ objectiveValue }, i) => expect(objectiveValue).toBeCloseTo(all.designs[i]?.objectiveValue ?? Number.NaN, 9))
      if (all.designs.length > 0) found++
    }), { numRuns: 12 })
    expect(found).toBeGreaterThan(2)
  }, 60_000)

  it('finds the cheapest of a usual shape, unless one of another is cheaper by a third', () => {
    let found = 0
    fc.assert(fc.property(requirements[kind], (requirement) => {
      const { request, price } = priceOf({ ...requirement, quantities: [100] })
      const policy = readGatePolicy(book)
      const prices: { usual: number, any: number } = { usual: Infinity, any: Infinity }
      // The objective is asked about every spring that passes; it notes the least there is.
      const note = (candidate: SizingCandidate<CatalogueWire>) => {
        const value = price.objective(candidate)
        prices.any = Math.min(prices.any, value)
        if (isUsualSpring(candidate, request, policy)) prices.usual = Math.min(prices.usual, value)
        return value
      }
      searchWires(request, fewWires, { objective: note })
      const { best } = searchDesign({ requirement: { ...requirement, quantities: [100] }, wires: fewWires, book })
      if (prices.any === Infinity) expect(best).toBeNull()
      else {
        found++
        expect(best?.objectiveValue ?? Number.NaN).toBeCloseTo(prices.usual <= prices.any * 1.5 ? prices.usual : prices.any, 9)
      }
    }), { numRuns: 12 })
    expect(found).toBeGreaterThan(2)
  }, 120_000)
})
