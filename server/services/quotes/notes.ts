import type { Requirement } from '#shared/schemas/enquiry'
import type { StoredDesign } from '#shared/schemas/quote'
import { getMaterial } from '#shared/spring/materials'

/** What the first note says already, or what is ours to mind and not the customer's. */
const NOT_FOR_CUSTOMERS: ReadonlySet<string> = new Set(['surroundings', 'stress-solid', 'clearance', 'wire-range', 'index'])

/** What the customer must mind when using the spring, in sentences. Common practice, no source; limits come from the checks. */
export function usageNotesOf(design: StoredDesign, request: Pick<Requirement, 'hottestC' | 'couldHurt' | 'surroundings'>): string[] {
  const mm = (value: number) => (Math.ceil(value * 10) / 10).toFixed(1)
  return [
    `Pressed shorter than ${mm(design.evaluation.shortestLengthMm)} mm, coils may touch and wear. Do not use it solid.`,
    `Calculated for up to ${request.hottestC} °C. ${getMaterial(design.material).corrosionNote}`,
    ...design.evaluation.checks.filter(check => !check.ok && !NOT_FOR_CUSTOMERS.has(check.code) && check.severity !== 'note').map(check => check.message),
    request.couldHurt === 'no'
      ? 'You told us that a break could hurt nobody. If that changes, ask us before use.'
      : 'You told us that a break could hurt someone. A qualified engineer must review the duty, by the rules of the place it is used in.',
  ]
}
