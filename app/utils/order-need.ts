import type { OrderFieldName } from './order-fields'
import type { OrderDraft } from './order-draft'

type Knowing = Pick<OrderDraft, 'kind' | 'knows' | 'knowsExtension' | 'knowsTorsion'>

/** What the customer knows about the chosen kind. */
export function knowsOf({ kind, knows, knowsExtension, knowsTorsion }: Knowing): string {
  return kind === 'compression' ? knows : kind === 'extension' ? knowsExtension : knowsTorsion
}

const TWO_LOADS = ['firstForce', 'firstLength', 'secondForce', 'secondLength'] as const
const LEGS = ['firstLeg', 'secondLeg'] as const

/** Fields that are needed for a kind and what is known of it. */
export const NEED_FIELDS: Readonly<Record<string, readonly OrderFieldName[]>> = {
  'compression:two-loads': TWO_LOADS,
  'compression:load-and-rate': ['firstForce', 'firstLength', 'rate'],
  'compression:rate-and-length': ['rate', 'freeLength', 'shortestLength'],
  'extension:two-loads': TWO_LOADS,
  'extension:load-and-rate': ['firstForce', 'firstLength', 'rate'],
  'extension:load-and-length': ['firstForce', 'firstLength', 'freeLength'],
  'torsion:two-moments': ['firstMoment', 'firstAngle', 'secondMoment', 'secondAngle', ...LEGS],
  'torsion:moment-and-rate': ['firstMoment', 'firstAngle', 'turnRate', ...LEGS],
  'torsion:moment-from-free': ['firstMoment', 'firstAngle', ...LEGS],
}

/** Fields that a draft needs to say what the spring must do. */
export const needFieldsOf = (draft: Knowing): readonly OrderFieldName[] => NEED_FIELDS[`${draft.kind}:${knowsOf(draft)}`] ?? []

type Values = Partial<Record<OrderFieldName, number>>

/** The need as the request says it, from the values in SI. */
export function readNeed(draft: Knowing, values: Values): Record<string, unknown> {
  const knows = knowsOf(draft)
  const load = { forceN: values.firstForce, lengthMm: values.firstLength }
  const moment = { momentNmm: values.firstMoment, angleDeg: values.firstAngle }
  switch (`${draft.kind}:${knows}`) {
    case 'compression:two-loads':
    case 'extension:two-loads': return { knows, first: load, second: { forceN: values.secondForce, lengthMm: values.secondLength } }
    case 'compression:load-and-rate':
    case 'extension:load-and-rate': return { knows, load, rateNPerMm: values.rate }
    case 'compression:rate-and-length': return { knows, rateNPerMm: values.rate, freeLengthMm: values.freeLength, shortestLengthMm: values.shortestLength }
    case 'extension:load-and-length': return { knows, load, freeLengthMm: values.freeLength }
    case 'torsion:two-moments': return { knows, first: moment, second: { momentNmm: values.secondMoment, angleDeg: values.secondAngle } }
    case 'torsion:moment-and-rate': return { knows, load: moment, rateNmmPerDeg: values.turnRate }
    default: return { knows, load: moment }
  }
}

const path = (name: string) => `requirement.need.${name}`
const FIRST_AND_SECOND: Record<string, OrderFieldName> = {
  [path('first.forceN')]: 'firstForce', [path('first.lengthMm')]: 'firstLength', [path('second.forceN')]: 'secondForce', [path('second.lengthMm')]: 'secondLength',
}
const LOAD: Record<string, OrderFieldName> = { [path('load.forceN')]: 'firstForce', [path('load.lengthMm')]: 'firstLength' }
const MOMENT: Record<string, OrderFieldName> = { [path('load.momentNmm')]: 'firstMoment', [path('load.angleDeg')]: 'firstAngle' }
const KNOWS_EXTENSION: Record<string, OrderFieldName> = { 'requirement.need.knows': 'knowsExtension', 'requirement.need': 'knowsExtension' }
const KNOWS_TORSION: Record<string, OrderFieldName> = { 'requirement.need.knows': 'knowsTorsion', 'requirement.need': 'knowsTorsion' }

/** Paths of the request to the fields they came from. */
export const NEED_PATHS: Readonly<Record<string, Record<string, OrderFieldName>>> = {
  'compression:two-loads': FIRST_AND_SECOND,
  'compression:load-and-rate': { ...LOAD, [path('rateNPerMm')]: 'rate' },
  'compression:rate-and-length': { [path('rateNPerMm')]: 'rate', [path('freeLengthMm')]: 'freeLength', [path('shortestLengthMm')]: 'shortestLength' },
  'extension:two-loads': { ...KNOWS_EXTENSION, ...FIRST_AND_SECOND },
  'extension:load-and-rate': { ...KNOWS_EXTENSION, ...LOAD, [path('rateNPerMm')]: 'rate' },
  'extension:load-and-length': { ...KNOWS_EXTENSION, ...LOAD, [path('freeLengthMm')]: 'freeLength' },
  'torsion:two-moments': {
    ...KNOWS_TORSION, [path('first.momentNmm')]: 'firstMoment', [path('first.angleDeg')]: 'firstAngle', [path('second.momentNmm')]: 'secondMoment', [path('second.angleDeg')]: 'secondAngle',
  },
  'torsion:moment-and-rate': { ...KNOWS_TORSION, ...MOMENT, [path('rateNmmPerDeg')]: 'turnRate' },
  'torsion:moment-from-free': { ...KNOWS_TORSION, ...MOMENT },
}
