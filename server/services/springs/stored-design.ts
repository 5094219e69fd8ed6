import type { StoredDesign } from '#shared/schemas/quote'
import type { Requirement } from '#shared/schemas/enquiry'
import { getMaterial } from '#shared/spring/materials'
import type { SpringInput } from '#shared/spring/mechanics/spring'
import type { SizedDesign, SizingCandidate, SizingResult, SpringSizeRequest } from '#shared/spring/sizing/types'
import type { PricedDesign } from '../../engine/pricing'
import { handOf } from './requirement'

/** What the search found, as it is kept with the quote. */
export function storedDesignOf(found: SizedDesign, searched: SizingResult['searched'], requirement: Requirement): StoredDesign {
  const hand = handOf(requirement)
  const common = {
    material: found.material, materialName: getMaterial(found.material).name, wireDiameterMm: found.wireDiameterMm, meanDiameterMm: found.meanDiameterMm,
    activeCoils: found.activeCoils, totalCoils: found.totalCoils, freeLengthMm: found.freeLengthMm, hand, toleranceGrade: requirement.toleranceGrade,
    wiresSearched: searched.wires, wiresFeasible: searched.feasibleWires,
  }
  switch (found.kind) {
    case 'compression': return { ...common, kind: 'compression', spring: { ...found.spring, hand }, evaluation: found.evaluation }
    case 'extension': return { ...common, kind: 'extension', spring: { ...found.spring, hand }, evaluation: found.evaluation }
    case 'torsion': return { ...common, kind: 'torsion', spring: { ...found.spring, hand }, evaluation: found.evaluation }
  }
}

type Measured = Omit<PricedDesign, 'material' | 'stressReliefMinutes' | 'stressReliefTempC'>

function pricedOf(material: StoredDesign['material'], measures: Measured): PricedDesign {
  const { stressRelief } = getMaterial(material)
  return {
    kind: measures.kind, material, wireDiameterMm: measures.wireDiameterMm, meanDiameterMm: measures.meanDiameterMm, activeCoils: measures.activeCoils, totalCoils: measures.totalCoils,
    freeLengthMm: measures.freeLengthMm, ends: measures.ends, wireLengthMm: measures.wireLengthMm, massG: measures.massG,
    stressReliefMinutes: stressRelief.minutes, stressReliefTempC: stressRelief.temperatureC,
  }
}

type Described = Pick<StoredDesign, 'kind' | 'material' | 'wireDiameterMm' | 'meanDiameterMm' | 'activeCoils' | 'totalCoils' | 'freeLengthMm'> & {
  spring: SpringInput, evaluation: Pick<StoredDesign['evaluation'], 'wireLengthMm' | 'massG'>
}

/** What pricing must know of a spring: its measures, its ends, and the stress relief of its material. */
export function pricedDesignOf(design: Described): PricedDesign {
  const { wireLengthMm, massG } = design.evaluation
  return pricedOf(design.material, { ...design, wireLengthMm, massG, ends: design.spring.kind === 'compression' ? design.spring.ends ?? 'closed-ground' : null })
}

/** What pricing must know of a spring the search asks about; what is formed at its ends follows from the request. */
export function pricedCandidateOf({ wire, ...measures }: SizingCandidate, request: SpringSizeRequest): PricedDesign {
  return pricedOf(wire.material, { ...measures, kind: request.kind, wireDiameterMm: wire.wireDiameterMm, ends: request.kind === 'compression' ? request.ends ?? 'closed-ground' : null })
}

const LENGTH_WORDS = { compression: 'long', extension: 'long inside its hooks', torsion: 'long in the body' } as const

/** A spring in a line, for e-mails: `2.5 mm wire (SH), 20 mm across, 60 mm long`. */
export function springWordsOf({ kind, materialName, wireDiameterMm, evaluation, freeLengthMm }: Pick<StoredDesign, 'kind' | 'materialName' | 'wireDiameterMm' | 'evaluation' | 'freeLengthMm'>): string {
  const mm = (value: number) => String(Number(value.toFixed(2)))
  return `${mm(wireDiameterMm)} mm wire (${materialName}), ${mm(evaluation.outerDiameterMm)} mm across, ${mm(freeLengthMm)} mm ${LENGTH_WORDS[kind]}`
}
