import { formatMoney, groupThousands } from '#shared/money'
import { figure } from './design-rules'
import type { GatePolicy } from './policy'
import type { GateReason, GateRequirement, GateRung } from './types'

/** Finishes that cost nothing beyond the book's lines. */
const FINISHES_AT_ONCE: ReadonlySet<string> = new Set(['none', 'oiled'])

/** Rules about what the spring is for and how it is to be made. */
export function judgeDuty(requirement: GateRequirement, policy: GatePolicy): GateReason[] {
  const reasons: GateReason[] = []
  if (requirement.toleranceGrade < policy.tightestGrade) {
    reasons.push({
      code: 'tolerance-grade',
      customerText: `Tolerance grade ${requirement.toleranceGrade} takes more setting and measuring, so a person prices it.`,
      estimatorText: `Tolerance grade ${requirement.toleranceGrade} is tighter than ${figure(policy.tightestGrade)}.`,
    })
  }
  if (requirement.strokes > policy.lifeMaxCycles) {
    reasons.push({
      code: 'life',
      customerText: 'The spring must last longer than we answer for without a person looking.',
      estimatorText: `${count(requirement.strokes)} strokes are over ${count(policy.lifeMaxCycles)}.`,
    })
  }
  if (requirement.coldestC < policy.temperatureMinC || requirement.hottestC > policy.temperatureMaxC) {
    reasons.push({
      code: 'temperature',
      customerText: 'It works colder or hotter than usual, so a person checks the material.',
      estimatorText: `${figure(requirement.coldestC)} to ${figure(requirement.hottestC)} °C goes beyond ${figure(policy.temperatureMinC)} to ${figure(policy.temperatureMaxC)} °C.`,
    })
  }
  if (policy.refusedSurroundings.has(requirement.surroundings)) {
    reasons.push({
      code: 'surroundings',
      customerText: `For ${requirement.surroundings} surroundings a person chooses material and finish with you.`,
      estimatorText: `Surroundings: ${requirement.surroundings}. Material and finish need a person.`,
    })
  }
  const finish = requirement.finish ?? 'none'
  if (!FINISHES_AT_ONCE.has(finish)) {
    reasons.push({
      code: 'finish',
      customerText: 'The finish is done outside our shop, so a person asks for its price.',
      estimatorText: `Finish “${finish}” has no rate in the price book.`,
    })
  }
  return reasons
}

/** Rules about how many, how much and by when. */
export function judgeOrder(requirement: GateRequirement, rungs: readonly GateRung[], policy: GatePolicy): GateReason[] {
  const reasons: GateReason[] = []
  const few = rungs.filter((rung) => rung.quantity < policy.quantityMin)
  const many = rungs.filter((rung) => rung.quantity > policy.quantityMax)
  const [fewest] = few
  if (fewest) {
    reasons.push({
      code: 'quantity',
      customerText: `Under ${count(policy.quantityMin)} springs a person looks for the cheapest way to make them.`,
      estimatorText: `${springs(fewest.quantity)} under the least of ${count(policy.quantityMin)}.`,
    })
  }
  const most = many[many.length - 1]
  if (most) {
    reasons.push({
      code: 'quantity',
      customerText: `Over ${count(policy.quantityMax)} springs a person plans the work with you.`,
      estimatorText: `${springs(most.quantity)} over the most of ${count(policy.quantityMax)}.`,
    })
  }
  const dearest = rungs.reduce<GateRung | undefined>((top, rung) => (!top || rung.netMinor > top.netMinor ? rung : top), undefined)
  if (dearest && dearest.netMinor > policy.valueMaxMinor) {
    reasons.push({
      code: 'order-value',
      customerText: 'An order of this size is read by a person before it is quoted.',
      estimatorText: `${formatMoney(dearest.netMinor, dearest.currency)} for ${count(dearest.quantity)} is over ${formatMoney(policy.valueMaxMinor, policy.currency)}.`,
    })
  }
  return [...reasons, ...judgeDate(requirement.neededOn, rungs)]
}

function judgeDate(neededOn: string | undefined, rungs: readonly GateRung[]): GateReason[] {
  if (neededOn === undefined || rungs.length === 0) return []
  const dates = rungs.flatMap((rung) => (rung.dispatchOn === null ? [] : [rung.dispatchOn])).sort()
  const earliest = dates[0]
  // ISO dates sort as text.
  if (earliest !== undefined && earliest <= neededOn) return []
  return [{
    code: 'needed-on',
    customerText: earliest === undefined
      ? 'We cannot see yet when the springs could leave, so a person answers about the date.'
      : `The springs can leave on ${dayText(earliest)}, not before; you need them by ${dayText(neededOn)}. A person looks for another way.`,
    estimatorText: earliest === undefined
      ? `Needed by ${dayText(neededOn)}; no date could be found in the plan.`
      : `Needed by ${dayText(neededOn)}; the plan gives ${dayText(earliest)} at the earliest.`,
  }]
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

function dayText(isoDate: string): string {
  const [year, month, day] = isoDate.slice(0, 10).split('-').map(Number)
  return `${day} ${MONTHS[(month ?? 1) - 1]} ${year}`
}

function count(value: number): string {
  return groupThousands(value.toFixed(0))
}

function springs(quantity: number): string {
  return quantity === 1 ? '1 spring is' : `${count(quantity)} springs are`
}
