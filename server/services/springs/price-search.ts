import type { Requirement } from '#shared/schemas/enquiry'
import type { MaterialCode } from '#shared/spring/codes'
import { getMaterial } from '#shared/spring/materials'
import type { SizingCandidate, SpringSizeRequest } from '#shared/spring/sizing/types'
import type { CatalogueWire } from '../catalogue/list-wires'
import { createPriceObjective, type PriceBook, type PriceOptions } from '../../engine/pricing'
import { pricedCandidateOf } from './stored-design'

/** Price as the search takes it: of one spring, major units, and the number that no spring of a wire of at least a mass falls under. */
export type PriceSearch = {
  objective: (candidate: SizingCandidate<CatalogueWire>) => number
  leastOfMass: (wire: CatalogueWire, massG: number) => number
}

/** Lighter springs than this are not asked about: a bound of no mass at all must still be a price. */
const LEAST_MASS_G = 1e-9
/** An index that slows no feed. */
const LOOSE_INDEX = 1e6

/**
 * The price of one spring at a quantity. For one wire and index it never falls with the length of wire, and so with the mass:
 * wire, coiling, furnace, packing all stay or grow with it (see `calculateJobQuantities`), and the rest depends on the
 * request; it never rises with the index. Where coils and diameter are continuous, springs are put in order as if none were
 * so tight that its feed is slowed: the search then asks for the lightest of a wire alone.
 */
export function priceSearchOf({ book, quantity, options, request }: { book: PriceBook, quantity: number, options: PriceOptions, request: SpringSizeRequest }): PriceSearch {
  const price = createPriceObjective({ book, quantity, options })
  const isStepped = request.coilStep !== undefined || request.diameterStepMm !== undefined
  const priceOf = (candidate: SizingCandidate<CatalogueWire>) => price(pricedCandidateOf(candidate, request), candidate.wire)
  const priceIfLoose = (candidate: SizingCandidate<CatalogueWire>) => priceOf({ ...candidate, meanDiameterMm: LOOSE_INDEX * candidate.wire.wireDiameterMm })
  return {
    objective: isStepped ? priceOf : priceIfLoose,
    leastOfMass: (wire, massG) => {
      const mass = Math.max(massG, LEAST_MASS_G)
      const wireLengthMm = mass * 4e6 / (Math.PI * wire.wireDiameterMm ** 2 * getMaterial(wire.material).densityKgPerM3.value)
      // Where the wire lies in the spring does not matter to the price.
      return priceIfLoose({ wire, massG: mass, wireLengthMm, meanDiameterMm: wire.wireDiameterMm, outerDiameterMm: wire.wireDiameterMm, activeCoils: 1, totalCoils: 1, freeLengthMm: 1 })
    },
  }
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
