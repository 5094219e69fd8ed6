import type { SizeRequest, SizeResponse } from '#shared/schemas/spring'
import type { SizingWire } from '#shared/spring/sizing/types'
import { listCatalogueWires, type CatalogueWire } from '../catalogue/list-wires'
import type { ServiceContext } from '../context'
import { getCurrentPriceBook } from '../price-books/get-current'
import { sizingThreads } from './sizing-threads'

/**
 * Designs that meet a requirement in order of the objective, or what clashes. The wires are those of the catalogue, narrowed to
 * the materials and diameters that are named; where both are named and the objective is no price, exactly those.
 * @throws DomainError unavailable when too many wait already
 */
export async function sizeFromCatalogue(context: Pick<ServiceContext, 'db' | 'timeZone'>, request: SizeRequest): Promise<SizeResponse> {
  if (request.objective !== 'price') {
    const wires = request.materials && request.wireDiametersMm
      ? namedWires(request.materials, request.wireDiametersMm)
      : narrow(await listCatalogueWires(context.db), request)
    return sizingThreads.run({ task: 'size', question: { request, wires, book: null } })
  }
  const [book, wires] = await Promise.all([getCurrentPriceBook(context), listCatalogueWires(context.db)])
  return sizingThreads.run({ task: 'size', question: { request, wires: narrow(wires, request).filter(wire => wire.currency === book.currency), book } })
}

function narrow(wires: readonly CatalogueWire[], { materials, wireDiametersMm }: Pick<SizeRequest, 'materials' | 'wireDiametersMm'>): CatalogueWire[] {
  return wires.filter(wire => (!materials || materials.includes(wire.material)) && (!wireDiametersMm || wireDiametersMm.includes(wire.wireDiameterMm)))
}

function namedWires(materials: NonNullable<SizeRequest['materials']>, diametersMm: readonly number[]): SizingWire[] {
  return [...new Set(materials)].flatMap(material => [...new Set(diametersMm)].map(wireDiameterMm => ({ id: `${material} ${wireDiameterMm}`, material, wireDiameterMm })))
}
