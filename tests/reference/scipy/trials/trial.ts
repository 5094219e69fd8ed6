import { MATERIAL_CODES, standardDiametersMm, type SizedDesign, type SizingWire, type SpringSizeRequest } from '#shared/spring'
import type { ModelWire } from '../run'
import { modelWireOf, type Dice } from '../wires'

/** A request for both sides: for sizing, and what the Python model is told of it. */
export interface Trial {
  readonly request: SpringSizeRequest
  readonly asked: object
  readonly wires: readonly SizingWire[]
  readonly model: readonly ModelWire[]
}

const catalogue: SizingWire[] = MATERIAL_CODES.flatMap(material => standardDiametersMm(material).map(d => ({ id: `${material} ${d}`, material, wireDiameterMm: d })))
const usual = catalogue.filter(wire => wire.wireDiameterMm >= 0.4 && wire.wireDiameterMm <= 10) as [SizingWire, ...SizingWire[]]

/** A thickness of the catalogue. */
export const pickThickness = (dice: Dice): number => dice.pick(usual).wireDiameterMm

/** All wires up to `times` thinner and thicker. */
export function wiresAround(d: number, times = 1.4): Pick<Trial, 'wires' | 'model'> {
  const near = catalogue.filter(wire => wire.wireDiameterMm > d / times && wire.wireDiameterMm < d * times)
  // Thinnest first, so that neighbours in the list are neighbours in what they do.
  const model = near.flatMap(wire => modelWireOf(wire) ?? []).sort((a, b) => a.diameter - b.diameter)
  return { wires: near.filter(wire => model.some(({ id }) => id === wire.id)), model }
}

/** The request as the Python search reads it, with the spring that sizing found. */
export function modelRequest({ asked, request, model }: Trial, design: SizedDesign | undefined, seed: number): object {
  const { kind, method, toleranceGrade, duty, fit } = request
  const coils = design && (kind === 'compression' ? design.activeCoils : design.totalCoils)
  return {
    kind, seed, wires: model, method, grade: toleranceGrade, cycles: duty?.cycles ?? 0, bore: fit?.boreMm ?? null, rod: fit?.rodMm ?? null, maxSolid: fit?.maxSolidLengthMm ?? null,
    maxFree: fit?.maxFreeLengthMm ?? null, ...asked,
    design: design ? { wireId: design.wireId, wireDiameter: design.wireDiameterMm, meanDiameter: design.meanDiameterMm, coils } : null,
  }
}
