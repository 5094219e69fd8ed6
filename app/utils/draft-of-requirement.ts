import type { Requirement } from '#shared/schemas/enquiry'
import { formatNumber } from '#shared/units/format'
import type { UnitSystem } from '#shared/units/convert'
import { formatDay } from './day-words'
import { typedNumber, type OrderDraft, type WrittenBySystem } from './order-draft'
import { QUANTITY_FIELDS, quantityOf, type OrderFieldName } from './order-fields'

/** What was asked for once, as it would be typed again in `units`: to change something, or to order anew. */
export function draftOfRequirement(requirement: Requirement, units: UnitSystem): { draft: Partial<OrderDraft>, written: WrittenBySystem } {
  const draft: Partial<OrderDraft> = {
    knows: requirement.need.knows, hand: requirement.hand, surroundings: requirement.surroundings, couldHurt: requirement.couldHurt, material: requirement.material, ends: requirement.ends,
    toleranceGrade: String(requirement.toleranceGrade), certificate: requirement.certificate, strokes: formatNumber(requirement.strokes), strokesPerMinute: requirement.strokesPerMinute ? String(requirement.strokesPerMinute) : '',
    neededOn: requirement.neededOn ? formatDay(requirement.neededOn) : '',
  }
  QUANTITY_FIELDS.forEach((field, at) => { draft[field] = requirement.quantities[at] === undefined ? '' : formatNumber(requirement.quantities[at]) })
  const written: WrittenBySystem = {}
  for (const [field, valueSi] of Object.entries(sizesOf(requirement)) as [OrderFieldName, number | undefined][]) {
    const quantity = quantityOf(field)
    if (!quantity || field === 'knows' || field === 'certificate') continue
    const text = valueSi === undefined ? '' : typedNumber(valueSi, quantity, units)
    draft[field] = text
    if (valueSi !== undefined) written[field] = { text, valueSi }
  }
  return { draft, written }
}

function sizesOf({ need, boreMm, rodMm, maxFreeLengthMm, maxSolidLengthMm, coldestC, hottestC }: Requirement): Partial<Record<OrderFieldName, number | undefined>> {
  const fit = { bore: boreMm, rod: rodMm, longest: maxFreeLengthMm, shortestRoom: maxSolidLengthMm, coldest: coldestC, hottest: hottestC }
  if (need.knows === 'two-loads') return { ...fit, firstForce: need.first.forceN, firstLength: need.first.lengthMm, secondForce: need.second.forceN, secondLength: need.second.lengthMm }
  if (need.knows === 'load-and-rate') return { ...fit, firstForce: need.load.forceN, firstLength: need.load.lengthMm, rate: need.rateNPerMm }
  return { ...fit, rate: need.rateNPerMm, freeLength: need.freeLengthMm, shortestLength: need.shortestLengthMm }
}
