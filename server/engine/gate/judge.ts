import { judgeDesign } from './design-rules'
import { judgeDuty, judgeOrder } from './order-rules'
import type { GatePolicy } from './policy'
import type { GateDesign, GateReason, GateRequirement, GateRung } from './types'

/**
 * Every rule of the gate an enquiry breaks, gravest first; none means the quote goes out at once. `design` is null where nothing
 * fits. What the customer wrote in free text is never a rule: a machine that reads it would be guessing.
 */
export function judgeGate(
  requirement: GateRequirement,
  design: GateDesign | null,
  rungs: readonly GateRung[],
  policy: GatePolicy,
): GateReason[] {
  const reasons: GateReason[] = []
  if (requirement.couldHurt) {
    reasons.push({
      code: 'could-hurt',
      customerText: 'A break could hurt someone, so a person answers. The duty also needs the review of a qualified engineer.',
      estimatorText: 'A break could hurt someone. The quote will say that a qualified engineer must review the duty.',
    })
  }
  if (design === null) {
    reasons.push({
      code: 'nothing-fits',
      customerText: 'No spring of our wire does all of this, so a person looks for a way.',
      estimatorText: 'No spring of the catalogue meets every requirement.',
    })
  }
  return [
    ...reasons,
    ...(design ? judgeDesign(design, policy) : []),
    ...judgeDuty(requirement, policy),
    ...judgeOrder(requirement, [...rungs].sort((a, b) => a.quantity - b.quantity), policy),
  ]
}
