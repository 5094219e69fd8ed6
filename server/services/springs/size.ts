import type { SizeRequest, SizeResponse } from '#shared/schemas/spring'
import { sizeCompression } from '#shared/spring/sizing'
import type { SizedDesign, SizingCandidate, SizingWire } from '#shared/spring/sizing/types'
import { listCatalogueWires, type CatalogueWire } from '../catalogue/list-wires'
import type { ServiceContext } from '../context'
import type { StoredPriceBook } from '../price-books/read-book'
import { getCurrentPriceBook } from '../price-books/get-current'
import { priceObjectiveOf } from './find-design'

const DEFAULT_QUANTITY = 100

/**
 * Designs that meet a requirement in order of the objective, or what clashes. The wires are those of the catalogue, narrowed to
 * the materials and diameters that are named; where both are named and the objective is no price, exactly those.
 */
export async function sizeSpring(context: Pick<ServiceContext, 'db' | 'timeZone'>, request: SizeRequest): Promise<SizeResponse> {
  if (request.objective !== 'price') {
    const wires = request.materials && request.wireDiametersMm
      ? namedWires(request.materials, request.wireDiametersMm)
      : narrow(await listCatalogueWires(context.db), request)
    return toResponse(sizeCompression(request, wires, { objective: request.objective }))
  }
  const [book, wires] = await Promise.all([getCurrentPriceBook(context), listCatalogueWires(context.db)])
  return toResponse(sizeCompression(request, narrow(wires, request).filter(wire => wire.currency === book.currency), { objective: priceOf(request, book) }))
}

function priceOf(request: SizeRequest, book: StoredPriceBook): (candidate: SizingCandidate<CatalogueWire>) => number {
  return priceObjectiveOf({
    book, quantity: request.quantity ?? DEFAULT_QUANTITY, options: { toleranceGrade: request.toleranceGrade ?? 2, certificate: 'none' }, ends: request.ends ?? 'closed-ground',
  })
}

function narrow(wires: readonly CatalogueWire[], { materials, wireDiametersMm }: Pick<SizeRequest, 'materials' | 'wireDiametersMm'>): CatalogueWire[] {
  return wires.filter(wire => (!materials || materials.includes(wire.material)) && (!wireDiametersMm || wireDiametersMm.includes(wire.wireDiameterMm)))
}

function namedWires(materials: NonNullable<SizeRequest['materials']>, diametersMm: readonly number[]): SizingWire[] {
  return [...new Set(materials)].flatMap(material => [...new Set(diametersMm)].map(wireDiameterMm => ({ id: `${material} ${wireDiameterMm}`, material, wireDiameterMm })))
}

/** Only what the document promises leaves: a wire of the catalogue carries price and stock. */
function toResponse<W extends SizingWire>(result: ReturnType<typeof sizeCompression<W>>): SizeResponse {
  const design = (found: SizedDesign<W>) => ({
    material: found.material, wireDiameterMm: found.wireDiameterMm, meanDiameterMm: found.meanDiameterMm, activeCoils: found.activeCoils, totalCoils: found.totalCoils,
    freeLengthMm: found.freeLengthMm, objectiveValue: found.objectiveValue, evaluation: found.evaluation as SizeResponse['designs'][number]['evaluation'],
  })
  return {
    designs: result.designs.map(design), searched: { ...result.searched },
    conflict: result.conflict && { requirements: [...result.conflict.requirements], changes: result.conflict.changes.map(({ path, from, to, design: found }) => ({ path, from, to, design: design(found) })) },
  }
}
