import type { Requirement } from '#shared/schemas/enquiry'
import type { UnitSystem } from '#shared/units/convert'
import { formatAngle, formatForce, formatLength, formatMoment, formatMomentRate, formatNumber, formatRate, formatTemperature } from '#shared/units/format'
import { ENDS_WORDS, HAND_WORDS, HOOK_CHOICES, KIND_WORDS, LEG_CHOICES, LOAD_CHOICES, MATERIAL_WORDS, SURROUNDINGS_WORDS, TOLERANCE_WORDS } from './choice-words'
import { formatDay } from './day-words'

export type Fact = { label: string, text: string }

const fact = (label: string, text: string): Fact => ({ label, text })
const given = (label: string, value: number | undefined, write: (value: number) => string): Fact[] => value === undefined ? [] : [fact(label, write(value))]

/** What the spring must do, as the customer said it. */
export function needFacts(requirement: Requirement, units: UnitSystem): Fact[] {
  const length = (value: number) => formatLength(value, units)
  const load = ({ forceN, lengthMm }: { forceN: number, lengthMm: number }) => `${formatForce(forceN, units)} at ${length(lengthMm)}`
  const moment = ({ momentNmm, angleDeg }: { momentNmm: number, angleDeg: number }) => `${formatMoment(momentNmm, units)} at ${formatAngle(angleDeg)}`
  if (requirement.kind === 'torsion') {
    const { need } = requirement
    switch (need.knows) {
      case 'two-moments': return [fact('First moment', moment(need.first)), fact('Second moment', moment(need.second))]
      case 'moment-and-rate': return [fact('Moment', moment(need.load)), fact('Rate', formatMomentRate(need.rateNmmPerDeg, units))]
      case 'moment-from-free': return [fact('Moment', `${moment(need.load)} from free`)]
    }
  }
  const { need } = requirement
  switch (need.knows) {
    case 'two-loads': return [fact('First load', load(need.first)), fact('Second load', load(need.second))]
    case 'load-and-rate': return [fact('Load', load(need.load)), fact('Rate', formatRate(need.rateNPerMm, units))]
    case 'load-and-length': return [fact('Load', load(need.load)), fact('Free length', length(need.freeLengthMm))]
    case 'rate-and-length': return [fact('Rate', formatRate(need.rateNPerMm, units)), fact('Free length', length(need.freeLengthMm)), fact('Pressed to', length(need.shortestLengthMm))]
  }
}

const LONGEST_WORDS = { compression: 'Longest, unloaded', extension: 'Longest inside the hooks, unloaded', torsion: 'Longest body, wound up' } as const

/** Where it must fit, and the ends it has. */
export function shapeFacts(requirement: Requirement, units: UnitSystem): Fact[] {
  const length = (value: number) => formatLength(value, units)
  const common = [
    ...given('In a bore of', requirement.boreMm, length), ...given('Over a rod of', requirement.rodMm, length), ...given(LONGEST_WORDS[requirement.kind], requirement.maxFreeLengthMm, length),
  ]
  switch (requirement.kind) {
    case 'compression': return [...common, ...given('Shortest room', requirement.maxSolidLengthMm, length), fact('Ends', ENDS_WORDS[requirement.ends])]
    case 'extension': return [...common, fact('Hooks', HOOK_CHOICES[requirement.hook])]
    case 'torsion': return [
      ...common, fact('Legs', `${length(requirement.firstLegMm)} and ${length(requirement.secondLegMm)}, ${LEG_CHOICES[requirement.legForm].toLowerCase()}`), fact('Turned', LOAD_CHOICES[requirement.load]),
    ]
  }
}

/** What was asked, as a list to read: only what the customer gave. */
export function requirementFacts(requirement: Requirement, units: UnitSystem): Fact[] {
  return [
    fact('Kind', KIND_WORDS[requirement.kind]), ...needFacts(requirement, units), ...shapeFacts(requirement, units),
    fact('Coils', HAND_WORDS[requirement.hand]), fact('Surroundings', SURROUNDINGS_WORDS[requirement.surroundings]),
    fact('Temperatures', `${formatTemperature(requirement.coldestC, units)} to ${formatTemperature(requirement.hottestC, units)}`),
    fact('Strokes in its life', formatNumber(requirement.strokes)), ...(requirement.strokesPerMinute > 0 ? [fact('Strokes a minute', formatNumber(requirement.strokesPerMinute))] : []),
    fact('Could a break hurt?', requirement.couldHurt === 'no' ? 'No' : 'Yes, or not sure'),
    fact('Material', requirement.material === 'any' ? 'Chosen by us' : MATERIAL_WORDS[requirement.material]),
    fact('Tolerances', TOLERANCE_WORDS[requirement.toleranceGrade]), ...(requirement.certificate ? [fact('Certificate', '3.1, EN 10204')] : []),
    fact('Quantities', requirement.quantities.map(quantity => formatNumber(quantity)).join(', ')), ...(requirement.neededOn ? [fact('Needed by', formatDay(requirement.neededOn))] : []),
  ]
}
