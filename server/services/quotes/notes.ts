import type { Requirement } from '#shared/schemas/enquiry'
import type { StoredDesign } from '#shared/schemas/quote'
import { getMaterial } from '#shared/spring/materials'

/** What another note or the sheet says already, or what is ours to mind and not the customer's. */
const NOT_FOR_CUSTOMERS: ReadonlySet<string> = new Set(['surroundings', 'stress-solid', 'stress-working', 'stress-hook-bending', 'stress-hook-torsion', 'clearance', 'wire-range', 'index'])

/** How far it may go and how it hurts, by kind. */
function handlingNotes(design: StoredDesign): string[] {
  const up = (value: number) => (Math.ceil(value * 10) / 10).toFixed(1)
  const down = (value: number) => (Math.floor(value * 10) / 10).toFixed(1)
  switch (design.kind) {
    case 'compression': return [`Pressed shorter than ${up(design.evaluation.shortestLengthMm)} mm, coils may touch and wear. Do not use it solid.`]
    case 'extension': {
      const { greatestLengthMm } = design.evaluation
      return [
        greatestLengthMm === null ? 'Nothing in the spring stops it from being pulled too far: give it a stop.' : `Never pull it beyond ${down(greatestLengthMm)} mm inside the hooks: nothing in the spring stops it, so give it a stop.`,
        'Pulled, it stores energy and flies when a hook slips or breaks: keep people out of its line, or guard it.',
      ]
    }
    case 'torsion': {
      const { greatestAngleDeg, recommendedRodMm } = design.evaluation
      const rodMm = design.spring.fit?.rodMm ?? design.spring.mandrelMm
      const way = design.spring.loadOpens ? 'the way that opens it, as asked for' : 'the way that winds it up'
      return [
        greatestAngleDeg === null ? `Turn it ${way} only, and give it a stop, so that it is never turned too far.` : `Turn it ${way} only, and never more than ${down(greatestAngleDeg)} degrees from free.`,
        rodMm === undefined
          ? `A rod through it may be ${down(recommendedRodMm)} mm thick at most: the coil grips a thicker one as it is turned.`
          : `It clears a rod of ${rodMm} mm up to the greatest angle asked for.`,
        'Turned, it stores energy and whips back when a leg slips: hold it with a tool, and wear eye protection.',
      ]
    }
  }
}

/** What the customer must mind when using the spring, in sentences. Common practice, no source; limits come from the checks. */
export function usageNotesOf(design: StoredDesign, request: Pick<Requirement, 'hottestC' | 'couldHurt' | 'surroundings'>): string[] {
  return [
    ...handlingNotes(design),
    `Calculated for up to ${request.hottestC} °C. ${getMaterial(design.material).corrosionNote}`,
    ...design.evaluation.checks.filter(check => !check.ok && !NOT_FOR_CUSTOMERS.has(check.code) && check.severity !== 'note').map(check => check.message),
    request.couldHurt === 'no'
      ? 'You told us that a break could hurt nobody. If that changes, ask us before use.'
      : 'You told us that a break could hurt someone. A qualified engineer must review the duty, by the rules of the place it is used in.',
  ]
}
