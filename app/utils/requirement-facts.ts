import type { Requirement } from '#shared/schemas/enquiry'
import type { UnitSystem } from '#shared/units/convert'
import { formatForce, formatLength, formatNumber, formatRate, formatTemperature } from '#shared/units/format'
import { ENDS_WORDS, HAND_WORDS, MATERIAL_WORDS, SURROUNDINGS_WORDS, TOLERANCE_WORDS } from './choice-words'
import { formatDay } from './day-words'

export type Fact = { label: string, text: string }

/** What was asked, as a list to read: only what the customer gave. */
export function requirementFacts(requirement: Requirement, units: UnitSystem): Fact[] {
  const { need } = requirement
  const length = (value: number) => formatLength(value, units)
  const force = (value: number) => formatForce(value, units)
  const facts: (Fact | null)[] = [
    ...(need.knows === 'two-loads'
      ? [{ label: 'First load', text: `${force(need.first.forceN)} at ${length(need.first.lengthMm)}` }, { label: 'Second load', text: `${force(need.second.forceN)} at ${length(need.second.lengthMm)}` }]
      : need.knows === 'load-and-rate'
        ? [{ label: 'Load', text: `${force(need.load.forceN)} at ${length(need.load.lengthMm)}` }, { label: 'Rate', text: formatRate(need.rateNPerMm, units) }]
        : [{ label: 'Rate', text: formatRate(need.rateNPerMm, units) }, { label: 'Free length', text: length(need.freeLengthMm) }, { label: 'Pressed to', text: length(need.shortestLengthMm) }]),
    given('Bore', requirement.boreMm, length), given('Rod', requirement.rodMm, length), given('Longest, unloaded', requirement.maxFreeLengthMm, length), given('Shortest room', requirement.maxSolidLengthMm, length),
    { label: 'Coils', text: HAND_WORDS[requirement.hand] }, { label: 'Surroundings', text: SURROUNDINGS_WORDS[requirement.surroundings] },
    { label: 'Temperatures', text: `${formatTemperature(requirement.coldestC, units)} to ${formatTemperature(requirement.hottestC, units)}` },
    { label: 'Strokes in its life', text: formatNumber(requirement.strokes) }, requirement.strokesPerMinute > 0 ? { label: 'Strokes a minute', text: formatNumber(requirement.strokesPerMinute) } : null,
    { label: 'Could a break hurt?', text: requirement.couldHurt === 'no' ? 'No' : 'Yes, or not sure' },
    { label: 'Material', text: requirement.material === 'any' ? 'Chosen by us' : MATERIAL_WORDS[requirement.material] }, { label: 'Ends', text: ENDS_WORDS[requirement.ends] },
    { label: 'Tolerances', text: TOLERANCE_WORDS[requirement.toleranceGrade] }, requirement.certificate ? { label: 'Certificate', text: '3.1, EN 10204' } : null,
    { label: 'Quantities', text: requirement.quantities.map(quantity => formatNumber(quantity)).join(', ') }, requirement.neededOn ? { label: 'Needed by', text: formatDay(requirement.neededOn) } : null,
  ]
  return facts.filter(fact => fact !== null)
}

const given = (label: string, value: number | undefined, write: (value: number) => string): Fact | null => value === undefined ? null : { label, text: write(value) }
