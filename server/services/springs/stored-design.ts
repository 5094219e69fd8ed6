import type { StoredDesign } from '#shared/schemas/quote'
import type { Requirement } from '#shared/schemas/enquiry'
import { getMaterial } from '#shared/spring/materials'
import type { SizedDesign, SizingCandidate, SizingResult, SpringSizeRequest } from '#shared/spring/sizing/types'
import type { PricedDesign } from '../../engine/pricing'
import { handOf } from './requirement'

/** Both ends on flat parallel seats, as the search assumes where nothing else is said. */
const SEATING = 0.5

/** What the search found, as it is kept with the quote. */
export function storedDesignOf(found: SizedDesign, searched: SizingResult['searched'], requirement: Requirement): StoredDesign {
  return {
    kind: 'compression', material: found.material, materialName: getMaterial(found.material).name,
    wireDiameterMm: found.wireDiameterMm, meanDiameterMm: found.meanDiameterMm, activeCoils: found.activeCoils, totalCoils: found.totalCoils, freeLengthMm: found.freeLengthMm,
    ends: requirement.ends, hand: handOf(requirement), seatingCoefficient: SEATING, toleranceGrade: requirement.toleranceGrade,
    evaluation: found.evaluation, wiresSearched: searched.wires, wiresFeasible: searched.feasibleWires,
  }
}

type Measured = Pick<PricedDesign, 'wireDiameterMm' | 'meanDiameterMm' | 'activeCoils' | 'totalCoils' | 'freeLengthMm' | 'wireLengthMm' | 'massG' | 'ends'>

/** What pricing must know of a spring: its measures, and the stress relief of its material. */
export function pricedDesignOf(material: StoredDesign['material'], measures: Measured): PricedDesign {
  const { stressRelief } = getMaterial(material)
  return {
    material, wireDiameterMm: measures.wireDiameterMm, meanDiameterMm: measures.meanDiameterMm, activeCoils: measures.activeCoils, totalCoils: measures.totalCoils,
    freeLengthMm: measures.freeLengthMm, ends: measures.ends, wireLengthMm: measures.wireLengthMm, massG: measures.massG,
    stressReliefMinutes: stressRelief.minutes, stressReliefTempC: stressRelief.temperatureC,
  }
}

/** What pricing must know of a spring the search asks about; what is formed at its ends follows from the request. */
export function pricedCandidateOf({ wire, ...measures }: SizingCandidate, request: SpringSizeRequest): PricedDesign {
  return pricedDesignOf(wire.material, { ...measures, wireDiameterMm: wire.wireDiameterMm, ends: request.kind === 'compression' ? request.ends ?? 'closed-ground' : 'closed' })
}

/** A spring in a line, for e-mails: `SH wire 2.5 mm, 20 mm across the middle, 60 mm long`. */
export function springWordsOf({ materialName, wireDiameterMm, evaluation, freeLengthMm }: Pick<StoredDesign, 'materialName' | 'wireDiameterMm' | 'evaluation' | 'freeLengthMm'>): string {
  const mm = (value: number) => String(Number(value.toFixed(2)))
  return `${mm(wireDiameterMm)} mm wire (${materialName}), ${mm(evaluation.outerDiameterMm)} mm across, ${mm(freeLengthMm)} mm long`
}
