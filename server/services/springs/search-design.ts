import type { Requirement } from '#shared/schemas/enquiry'
import { sizeSpring } from '#shared/spring/sizing'
import type { SizedDesign, SizingResult } from '#shared/spring/sizing/types'
import type { CatalogueWire } from '../catalogue/list-wires'
import { readGatePolicy } from '../../engine/gate'
import type { PriceBook } from '../../engine/pricing'
import { allowedMaterialsFor } from './allowed-materials'
import { mainQuantityOf, priceOptionsOf, priceSearchOf, wiresFor } from './price-search'
import { sizeRequestOf } from './requirement'
import { isUsualSpring } from './usual-spring'

export type DesignQuestion = { requirement: Requirement, wires: readonly CatalogueWire[], book: PriceBook }

export type FoundDesign = {
  best: SizedDesign<CatalogueWire> | null
  result: SizingResult<CatalogueWire>
  /** Why some materials were left out; null where none was. */
  materialRule: string | null
}

/** What a usual shape may cost over the cheapest of all before a person rather looks at the cheap one (common practice, no source). */
const WORTH_A_USUAL_SHAPE = 1.5

/**
 * The spring of the catalogue that does what is asked for at the lowest price, or what stands in the way. Plain computing.
 *
 * The cheapest spring of a usual shape is preferred while it costs at most half as much again: wire alone would make the
 * thinnest and longest one, which bows in any bore that is not close around it and would send nearly every enquiry to a
 * person. Else the cheapest of all is taken, and the gate says what is unusual. A requirement is sized in steps, and every
 * stepped spring of every wire that could win is asked about, so both answers are the best there is.
 */
export function searchDesign({ requirement, wires, book }: DesignQuestion): FoundDesign {
  const { materials, rule } = allowedMaterialsFor(requirement)
  const request = sizeRequestOf(requirement, 1)
  const price = priceSearchOf({ book, quantity: mainQuantityOf(requirement.quantities), options: priceOptionsOf(requirement), request })
  const policy = readGatePolicy(book)
  const allowed = wiresFor(wires, materials, book)
  const any = sizeSpring(request, allowed, price)
  const [cheapest] = any.designs
  if (!cheapest) return { best: null, result: any, materialRule: rule }
  const dearest = cheapest.objectiveValue * WORTH_A_USUAL_SHAPE
  // Wires whose springs are all dearer, or not usual by the wire alone, are not asked about: there may be millions of springs.
  const usual = sizeSpring(request, allowed, {
    objective: candidate => isUsualSpring(candidate, request, policy) ? price.objective(candidate) : Number.NaN,
    leastOfMass: (wire, massG) => {
      const least = wire.wireDiameterMm >= policy.wireMinMm && wire.wireDiameterMm <= policy.wireMaxMm ? price.leastOfMass(wire, massG) : Infinity
      return least <= dearest ? least : Infinity
    },
    explainConflict: false,
  })
  const [usualBest] = usual.designs
  const result = usualBest && usualBest.objectiveValue <= dearest ? usual : any
  return { best: result.designs[0] ?? null, result, materialRule: rule }
}
