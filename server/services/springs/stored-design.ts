import type { StoredDesign } from '#shared/schemas/quote'
import type { Requirement } from '#shared/schemas/enquiry'
import { getMaterial } from '#shared/spring/materials'
import type { CompressionConditions } from '#shared/spring/mechanics/compression/types'
import type { ExtensionConditions } from '#shared/spring/mechanics/extension/types'
import type { SpringInput } from '#shared/spring/mechanics/spring'
import { storedEnergyJ } from '#shared/spring/mechanics/torsion/bending'
import type { TorsionConditions } from '#shared/spring/mechanics/torsion/types'
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

type Measured = Pick<PricedDesign, 'wireDiameterMm' | 'meanDiameterMm' | 'activeCoils' | 'totalCoils' | 'freeLengthMm' | 'wireLengthMm' | 'massG'>
/** What a spring and a request for one say of its ends. */
type Ended =
  | { kind: 'compression' } & Pick<CompressionConditions, 'ends'>
  | { kind: 'extension' } & Pick<ExtensionConditions, 'hook'>
  | { kind: 'torsion' } & Pick<TorsionConditions, 'legs'>

/** How the ends are made, where nothing is said as the calculation takes it. */
function endsOf(ended: Ended): Pick<PricedDesign, 'kind' | 'ends' | 'formed'> {
  switch (ended.kind) {
    case 'compression': return { kind: 'compression', ends: ended.ends ?? 'closed-ground', formed: null }
    case 'extension': return { kind: 'extension', ends: null, formed: ended.hook?.form ?? 'full-loop' }
    case 'torsion': return { kind: 'torsion', ends: null, formed: ended.legs?.[0]?.form ?? null }
  }
}

function pricedOf(material: StoredDesign['material'], measures: Measured, ended: Ended): PricedDesign {
  const { stressRelief } = getMaterial(material)
  const { kind, ends, formed } = endsOf(ended)
  return {
    kind, material, wireDiameterMm: measures.wireDiameterMm, meanDiameterMm: measures.meanDiameterMm, activeCoils: measures.activeCoils, totalCoils: measures.totalCoils,
    freeLengthMm: measures.freeLengthMm, ends, formed, wireLengthMm: measures.wireLengthMm, massG: measures.massG,
    stressReliefMinutes: stressRelief.minutes, stressReliefTempC: stressRelief.temperatureC,
  }
}

type Described = Omit<Measured, 'wireLengthMm' | 'massG'> & { material: StoredDesign['material'], spring: SpringInput, evaluation: Pick<Measured, 'wireLengthMm' | 'massG'> }

/** What pricing must know of a spring: its measures, its ends, and the stress relief of its material. */
export function pricedDesignOf(design: Described): PricedDesign {
  const { wireLengthMm, massG } = design.evaluation
  return pricedOf(design.material, { ...design, wireLengthMm, massG }, design.spring)
}

/** What pricing must know of a spring the search asks about; what is formed at its ends follows from the request. */
export function pricedCandidateOf(candidate: SizingCandidate, request: SpringSizeRequest): PricedDesign {
  const { wire } = candidate
  return pricedOf(wire.material, { ...candidate, wireDiameterMm: wire.wireDiameterMm }, request)
}

const NMM_PER_J = 1000

/** Energy a spring holds at its greatest working load, J; nought where it has no load. */
export function storedEnergyOf({ evaluation }: Pick<StoredDesign, 'evaluation'>): number {
  if (evaluation.kind === 'torsion') {
    const last = evaluation.points.at(-1)
    return last ? storedEnergyJ(last.momentNmm, last.angleDeg) : 0
  }
  const last = evaluation.points.at(-1)
  // Under the line from the force that opens the coils, or from nought, to the greatest.
  const start = evaluation.kind === 'extension' ? evaluation.initialTensionN : 0
  return last ? (start + last.forceN) / 2 * last.deflectionMm / NMM_PER_J : 0
}

const LENGTH_WORDS = { compression: 'long', extension: 'long inside its hooks', torsion: 'long in the body' } as const

/** A spring in a line, for e-mails: `2.5 mm wire (SH), 20 mm across, 60 mm long`. */
export function springWordsOf({ kind, materialName, wireDiameterMm, evaluation, freeLengthMm }: Pick<StoredDesign, 'kind' | 'materialName' | 'wireDiameterMm' | 'evaluation' | 'freeLengthMm'>): string {
  const mm = (value: number) => String(Number(value.toFixed(2)))
  return `${mm(wireDiameterMm)} mm wire (${materialName}), ${mm(evaluation.outerDiameterMm)} mm across, ${mm(freeLengthMm)} mm ${LENGTH_WORDS[kind]}`
}
