import type { SizeRequest, SizeResponse } from '#shared/schemas/spring'
import { sizeSpring, type SearchOptions } from '#shared/spring/sizing'
import type { SizedDesign, SizingResult, SizingWire } from '#shared/spring/sizing/types'
import type { CatalogueWire } from '../catalogue/list-wires'
import type { PriceBook } from '../../engine/pricing'
import { priceSearchOf } from './price-search'

/** A request with the wires it searches: from the catalogue and priced by a book, or just named. */
export type SizeQuestion =
  | { request: SizeRequest, wires: readonly CatalogueWire[], book: PriceBook }
  | { request: SizeRequest, wires: readonly SizingWire[], book: null }

const DEFAULT_QUANTITY = 100

/** Designs in order of the objective, or what clashes. Plain computing. */
export function answerSizeRequest(question: SizeQuestion): SizeResponse {
  const { request } = question
  if (question.book === null) return size(request, question.wires, { objective: request.objective === 'stress' ? 'stress' : 'mass' })
  return size(request, question.wires, priceSearchOf({
    book: question.book, quantity: request.quantity ?? DEFAULT_QUANTITY, options: { toleranceGrade: request.toleranceGrade ?? 2, certificate: 'none' }, request,
  }))
}

const size = <W extends SizingWire>(request: SizeRequest, wires: readonly W[], options: SearchOptions<W>): SizeResponse => toResponse(sizeSpring(request, wires, options))

/** Only what the document promises leaves: a wire of the catalogue carries price and stock. */
function toResponse<W extends SizingWire>({ designs, searched, conflict }: SizingResult<W>): SizeResponse {
  const show = ({ wire: _wire, wireId: _id, ...design }: SizedDesign<W>) => design as SizeResponse['designs'][number]
  return {
    designs: designs.map(show), searched: { ...searched },
    conflict: conflict && { requirements: [...conflict.requirements], changes: conflict.changes.map(({ path, from, to, design }) => ({ path, from, to, design: show(design) })) },
  }
}
