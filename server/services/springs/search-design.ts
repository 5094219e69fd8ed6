import type { Requirement } from '#shared/schemas/enquiry'
import { sizeSpring } from '#shared/spring/sizing'
import type { SizedDesign, SizingCandidate, SizingResult } from '#shared/spring/sizing/types'
import type { CatalogueWire } from '../catalogue/list-wires'
import { isUsualShape, readGatePolicy } from '../../engine/gate'
import type { PriceBook } from '../../engine/pricing'
import { allowedMaterialsFor } from './allowed-materials'
import { mainQuantityOf, priceOptionsOf, priceSearchOf, wiresFor } from './price-search'
import { sizeRequestOf } from './requirement'

export type DesignQuestion = { requirement: Requirement, wires: readonly CatalogueWire[], book: PriceBook }

export type FoundDesign = {
  best: SizedDesign<CatalogueWire> | null
  result: SizingResult<CatalogueWire>
  /** Why some materials were left out; null where none was. */
  materialRule: string | null
}

/** What a usual shape may cost over the cheapest of all before a person rather looks at the cheap one (common practice, no source). */
const WORTH_A_USUAL_SHAPE = 1.5

/** Coils under which the checks ask for care: active ones of compression springs, those of the body else (common practice, no source). */
const EASY_COILS = { compression: 3, extension: 4, torsion: 4 } as const

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
  // Slenderness is a matter of springs that are pressed.
  const isUsual = ({ wire, meanDiameterMm, freeLengthMm, activeCoils, totalCoils }: SizingCandidate<CatalogueWire>) => (request.kind === 'compression' ? activeCoils : totalCoils) >= EASY_COILS[request.kind] && isUsualShape({
    springIndex: meanDiameterMm / wire.wireDiameterMm, wireDiameterMm: wire.wireDiameterMm, slenderness: request.kind === 'compression' ? freeLengthMm / meanDiameterMm : 0,
  }, policy)
  const allowed = wiresFor(wires, materials, book)
  const usual = sizeSpring(request, allowed, {
    objective: candidate => isUsual(candidate) ? price.objective(candidate) : Number.NaN,
    leastOfMass: (wire, massG) => wire.wireDiameterMm >= policy.wireMinMm && wire.wireDiameterMm <= policy.wireMaxMm ? price.leastOfMass(wire, massG) : Infinity,
    explainConflict: false,
  })
  const [usualBest] = usual.designs
  const any = sizeSpring(request, allowed, { ...price, explainConflict: !usualBest })
  const [cheapest] = any.designs
  const result = usualBest && (!cheapest || usualBest.objectiveValue <= cheapest.objectiveValue * WORTH_A_USUAL_SHAPE) ? usual : any
  return { best: result.designs[0] ?? null, result, materialRule: rule }
}
