import type { Requirement } from '#shared/schemas/enquiry'
import { formatNumber } from '#shared/units/format'
import type { UnitSystem } from '#shared/units/convert'
import { formatDay } from './day-words'
import { isChoice, typedNumber, type OrderDraft, type WrittenBySystem } from './order-draft'
import { QUANTITY_FIELDS, quantityOf, type OrderFieldName } from './order-fields'

/** What was asked for once, as it would be typed again in `units`: to change something, or to order anew. */
export function draftOfRequirement(requirement: Requirement, units: UnitSystem): { draft: Partial<OrderDraft>, written: WrittenBySystem } {
  const draft: Partial<OrderDraft> = {
    ...kindOf(requirement), hand: requirement.hand, surroundings: requirement.surroundings, couldHurt: requirement.couldHurt, material: requirement.material,
    toleranceGrade: String(requirement.toleranceGrade), certificate: requirement.certificate, strokes: formatNumber(requirement.strokes), strokesPerMinute: requirement.strokesPerMinute ? String(requirement.strokesPerMinute) : '',
    neededOn: requirement.neededOn ? formatDay(requirement.neededOn) : '',
  }
  QUANTITY_FIELDS.forEach((field, at) => { draft[field] = requirement.quantities[at] === undefined ? '' : formatNumber(requirement.quantities[at]) })
  const written: WrittenBySystem = {}
  for (const [field, valueSi] of Object.entries(sizesOf(requirement)) as [OrderFieldName, number | undefined][]) {
    const quantity = quantityOf(field)
    if (!quantity || isChoice(field)) continue
    const text = valueSi === undefined ? '' : typedNumber(valueSi, quantity, units)
    draft[field] = text
    if (valueSi !== undefined) written[field] = { text, valueSi }
  }
  return { draft, written }
}

function kindOf(requirement: Requirement): Partial<OrderDraft> {
  switch (requirement.kind) {
    case 'compression': return { kind: 'compression', knows: requirement.need.knows, ends: requirement.ends }
    case 'extension': return { kind: 'extension', knowsExtension: requirement.need.knows, hook: requirement.hook }
    case 'torsion': return { kind: 'torsion', knowsTorsion: requirement.need.knows, legForm: requirement.legForm, load: requirement.load }
  }
}

type Sizes = Partial<Record<OrderFieldName, number | undefined>>

function sizesOf(requirement: Requirement): Sizes {
  const { boreMm, rodMm, maxFreeLengthMm, coldestC, hottestC } = requirement
  const common = { bore: boreMm, rod: rodMm, longest: maxFreeLengthMm, coldest: coldestC, hottest: hottestC }
  switch (requirement.kind) {
    case 'compression': return { ...common, shortestRoom: requirement.maxSolidLengthMm, ...loadSizes(requirement.need) }
    case 'extension': return { ...common, ...loadSizes(requirement.need) }
    case 'torsion': return { ...common, firstLeg: requirement.firstLegMm, secondLeg: requirement.secondLegMm, ...momentSizes(requirement.need) }
  }
}

function loadSizes(need: Extract<Requirement, { kind: 'compression' | 'extension' }>['need']): Sizes {
  switch (need.knows) {
    case 'two-loads': return { firstForce: need.first.forceN, firstLength: need.first.lengthMm, secondForce: need.second.forceN, secondLength: need.second.lengthMm }
    case 'load-and-rate': return { firstForce: need.load.forceN, firstLength: need.load.lengthMm, rate: need.rateNPerMm }
    case 'load-and-length': return { firstForce: need.load.forceN, firstLength: need.load.lengthMm, freeLength: need.freeLengthMm }
    case 'rate-and-length': return { rate: need.rateNPerMm, freeLength: need.freeLengthMm, shortestLength: need.shortestLengthMm }
  }
}

function momentSizes(need: Extract<Requirement, { kind: 'torsion' }>['need']): Sizes {
  if (need.knows === 'two-moments') return { firstMoment: need.first.momentNmm, firstAngle: need.first.angleDeg, secondMoment: need.second.momentNmm, secondAngle: need.second.angleDeg }
  return { firstMoment: need.load.momentNmm, firstAngle: need.load.angleDeg, ...(need.knows === 'moment-and-rate' ? { turnRate: need.rateNmmPerDeg } : {}) }
}
