import type { Requirement } from '#shared/schemas/enquiry'
import { sizeCompression } from '#shared/spring/sizing'
import type { SizedDesign, SizingCandidate, SizingResult } from '#shared/spring/sizing/types'
import type { CompressionEnds, MaterialCode } from '#shared/spring/codes'
import type { CatalogueWire } from '../catalogue/list-wires'
import { isUsualShape, readGatePolicy } from '../../engine/gate'
import { createPriceObjective, type PriceBook, type PriceOptions } from '../../engine/pricing'
import { allowedMaterialsFor } from './allowed-materials'
import { sizeRequestOf } from './requirement'
import { pricedDesignOf } from './stored-design'

export type FoundDesign = {
  best: SizedDesign<CatalogueWire> | null
  result: SizingResult<CatalogueWire>
  /** Why some materials were left out; null where none was. */
  materialRule: string | null
}

/** What makes one candidate better than another: the price of one spring at a quantity. */
export function priceObjectiveOf({ book, quantity, options, ends }: { book: PriceBook, quantity: number, options: PriceOptions, ends: CompressionEnds }): (candidate: SizingCandidate<CatalogueWire>) => number {
  const price = createPriceObjective({ book, quantity, options })
  return candidate => price(pricedDesignOf(candidate.wire.material, { ...candidate, wireDiameterMm: candidate.wire.wireDiameterMm, ends }), candidate.wire)
}

/** Wires of the allowed materials that are priced in the book's currency. */
export const wiresFor = (wires: readonly CatalogueWire[], materials: readonly MaterialCode[], book: Pick<PriceBook, 'currency'>): CatalogueWire[] =>
  wires.filter(wire => wire.currency === book.currency && materials.includes(wire.material))

/** The quantity a spring is made cheapest for: the middle one asked for, the lower of two. */
export function mainQuantityOf(quantities: readonly number[]): number {
  const sorted = [...quantities].sort((a, b) => a - b)
  return sorted[Math.floor((sorted.length - 1) / 2)]!
}

/** The options of a price that a requirement asks for. */
export const priceOptionsOf = (requirement: Pick<Requirement, 'toleranceGrade' | 'certificate'>): PriceOptions =>
  ({ toleranceGrade: requirement.toleranceGrade, certificate: requirement.certificate ? '3.1' : 'none' })

const MOST_KEPT = 40
const kept = new WeakMap<readonly CatalogueWire[], Map<string, FoundDesign>>()

/**
 * The spring of the catalogue that does what is asked for at the lowest price, or what stands in the way. Finding out what
 * clashes takes about a second of computing, so the answers to the last questions are kept while wire and prices stay the same.
 */
export function findDesign(requirement: Requirement, { wires, book }: { wires: readonly CatalogueWire[], book: PriceBook }): FoundDesign {
  const found = kept.get(wires) ?? new Map<string, FoundDesign>()
  kept.set(wires, found)
  const question = JSON.stringify([book.number, requirement])
  const known = found.get(question)
  if (known) return known
  const answer = searchDesign(requirement, { wires, book })
  const [oldest] = found.keys()
  if (found.size >= MOST_KEPT && oldest !== undefined) found.delete(oldest)
  found.set(question, answer)
  return answer
}

/** What a usual shape may cost over the cheapest of all before a person rather looks at the cheap one (common practice, no source). */
const WORTH_A_USUAL_SHAPE = 1.5

/**
 * The cheapest spring of a usual shape is preferred while it costs at most half as much again: wire alone would make the thinnest and longest one,
 * which bows in any bore that is not close around it and would send nearly every enquiry to a person. Else the cheapest of
 * all is taken, and the gate says what is unusual.
 */
function searchDesign(requirement: Requirement, { wires, book }: { wires: readonly CatalogueWire[], book: PriceBook }): FoundDesign {
  const { materials, rule } = allowedMaterialsFor(requirement)
  const price = priceObjectiveOf({ book, quantity: mainQuantityOf(requirement.quantities), options: priceOptionsOf(requirement), ends: requirement.ends })
  const policy = readGatePolicy(book)
  const usualPrice = (candidate: SizingCandidate<CatalogueWire>) => isUsualShape({
    springIndex: candidate.meanDiameterMm / candidate.wire.wireDiameterMm, wireDiameterMm: candidate.wire.wireDiameterMm, slenderness: candidate.freeLengthMm / candidate.meanDiameterMm,
  }, policy) ? price(candidate) : Number.NaN
  const request = sizeRequestOf(requirement, 1)
  const allowed = wiresFor(wires, materials, book)
  // Price does not follow mass once shapes are left out, so every stepped spring of each wire is asked about.
  const usual = sizeCompression(request, allowed, { objective: usualPrice, candidatesPerWire: Infinity, explainConflict: false })
  const [usualBest] = usual.designs
  const any = sizeCompression(request, allowed, { objective: price, explainConflict: !usualBest })
  const [cheapest] = any.designs
  const result = usualBest && (!cheapest || usualBest.objectiveValue <= cheapest.objectiveValue * WORTH_A_USUAL_SHAPE) ? usual : any
  return { best: result.designs[0] ?? null, result, materialRule: rule }
}
