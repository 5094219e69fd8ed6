import type { RequirementInput } from '#shared/schemas/enquiry'
import type { CountryCode } from '#shared/countries'
import { fromSi, type Quantity, type UnitSystem } from '#shared/units/convert'
import { parseNumber, parseQuantity } from '#shared/units/parse'
import { parseDay } from './day-words'
import { ORDER_FIELD_NAMES, QUANTITY_FIELDS, quantityOf, type OrderFieldName } from './order-fields'

/** The order form as typed: text in the units the person uses. */
export type OrderDraft = Record<Exclude<OrderFieldName, 'certificate' | 'knows'>, string> & { certificate: boolean, knows: RequirementInput['need']['knows'], website: string }

export const emptyDraft = (): OrderDraft => ({
  knows: 'two-loads', firstForce: '', firstLength: '', secondForce: '', secondLength: '', rate: '', freeLength: '', shortestLength: '',
  bore: '', rod: '', longest: '', shortestRoom: '', hand: 'either',
  surroundings: 'dry', coldest: '', hottest: '', strokes: '10 000', strokesPerMinute: '', couldHurt: '',
  material: 'any', ends: 'closed-ground', toleranceGrade: '2', certificate: false,
  quantity1: '100', quantity2: '250', quantity3: '500', quantity4: '1 000', quantity5: '2 000', quantity6: '', neededOn: '',
  title: '', name: '', firm: '', email: '', country: 'IE', vatNumber: '', remarks: '', website: '',
})

/** What says who somebody is; never kept on the device. */
export const PERSONAL_FIELDS = ['title', 'name', 'firm', 'email', 'vatNumber', 'remarks', 'website'] as const satisfies readonly (keyof OrderDraft)[]

/** Text that a change of units wrote, with the exact SI value behind it, so that going back and forth loses nothing. */
export type WrittenBySystem = Partial<Record<OrderFieldName, { text: string, valueSi: number }>>

/** Fields that are needed for what the customer knows. */
export const NEED_FIELDS: Readonly<Record<OrderDraft['knows'], readonly OrderFieldName[]>> = {
  'two-loads': ['firstForce', 'firstLength', 'secondForce', 'secondLength'],
  'load-and-rate': ['firstForce', 'firstLength', 'rate'],
  'rate-and-length': ['rate', 'freeLength', 'shortestLength'],
}
const ALL_NEED_FIELDS = new Set<OrderFieldName>(Object.values(NEED_FIELDS).flat())

/** A draft as read: the request's body, not yet validated; what could not be read; and which field each path of the body came from. */
export type ReadDraft = {
  requirement: Record<string, unknown>
  contact: Record<string, unknown>
  faults: Partial<Record<OrderFieldName, string>>
  /** Values in SI by field, for those that could be read. */
  valuesSi: Partial<Record<OrderFieldName, number>>
  fieldOfPath: Record<string, OrderFieldName>
}

/** Reads a draft typed in `units`. `today` (YYYY-MM-DD) settles a date without a year. */
export function readDraft(draft: OrderDraft, { units, today, written = {} }: { units: UnitSystem, today: string, written?: WrittenBySystem }): ReadDraft {
  const faults: ReadDraft['faults'] = {}
  const valuesSi: ReadDraft['valuesSi'] = {}

  for (const field of ORDER_FIELD_NAMES) {
    const quantity = quantityOf(field)
    if (!quantity || (ALL_NEED_FIELDS.has(field) && !NEED_FIELDS[draft.knows].includes(field))) continue
    const text = String(draft[field])
    if (text.trim() === '') continue
    const kept = written[field]
    const parsed = kept?.text === text ? { ok: true, value: kept.valueSi } as const : parseQuantity(text, quantity, units)
    if (parsed.ok) valuesSi[field] = parsed.value
    else faults[field] = parsed.message
  }
  const count = (field: OrderFieldName): number | undefined => {
    const text = String(draft[field])
    if (text.trim() === '') return undefined
    const parsed = parseNumber(text)
    if (!parsed.ok) faults[field] = parsed.message
    return parsed.ok ? parsed.value : undefined
  }

  const fieldOfPath: ReadDraft['fieldOfPath'] = { ...PATHS, ...NEED_PATHS[draft.knows] }
  const quantities: number[] = []
  for (const field of QUANTITY_FIELDS) {
    const quantity = count(field)
    if (quantity === undefined) continue
    fieldOfPath[`requirement.quantities.${quantities.length}`] = field
    quantities.push(quantity)
  }
  const day = draft.neededOn.trim() === '' ? undefined : parseDay(draft.neededOn, today)
  if (day && !day.ok) faults.neededOn = day.message

  const requirement = {
    kind: 'compression', need: readNeed(draft.knows, valuesSi),
    boreMm: valuesSi.bore, rodMm: valuesSi.rod, maxFreeLengthMm: valuesSi.longest, maxSolidLengthMm: valuesSi.shortestRoom, hand: draft.hand,
    surroundings: draft.surroundings, coldestC: valuesSi.coldest, hottestC: valuesSi.hottest, strokes: count('strokes'), strokesPerMinute: count('strokesPerMinute'),
    couldHurt: draft.couldHurt || undefined, material: draft.material, ends: draft.ends, toleranceGrade: Number(draft.toleranceGrade), certificate: draft.certificate,
    quantities, neededOn: day?.ok ? day.day : undefined,
  }
  const contact = {
    title: draft.title, name: draft.name, firm: draft.firm, email: draft.email, countryCode: draft.country, vatNumber: draft.vatNumber.trim() || undefined, remarks: draft.remarks,
  }
  return { requirement, contact, faults, valuesSi, fieldOfPath }
}

function readNeed(knows: OrderDraft['knows'], { firstForce, firstLength, secondForce, secondLength, rate, freeLength, shortestLength }: ReadDraft['valuesSi']): Record<string, unknown> {
  const first = { forceN: firstForce, lengthMm: firstLength }
  if (knows === 'two-loads') return { knows, first, second: { forceN: secondForce, lengthMm: secondLength } }
  return knows === 'load-and-rate' ? { knows, load: first, rateNPerMm: rate } : { knows, rateNPerMm: rate, freeLengthMm: freeLength, shortestLengthMm: shortestLength }
}

const PATHS: Record<string, OrderFieldName> = {
  'requirement.boreMm': 'bore', 'requirement.rodMm': 'rod', 'requirement.maxFreeLengthMm': 'longest', 'requirement.maxSolidLengthMm': 'shortestRoom', 'requirement.hand': 'hand',
  'requirement.surroundings': 'surroundings', 'requirement.coldestC': 'coldest', 'requirement.hottestC': 'hottest', 'requirement.strokes': 'strokes', 'requirement.strokesPerMinute': 'strokesPerMinute',
  'requirement.couldHurt': 'couldHurt', 'requirement.material': 'material', 'requirement.ends': 'ends', 'requirement.toleranceGrade': 'toleranceGrade', 'requirement.certificate': 'certificate',
  'requirement.quantities': 'quantity1', 'requirement.neededOn': 'neededOn', 'requirement.need.knows': 'knows', 'requirement.need': 'knows', 'requirement.kind': 'knows',
  'contact.title': 'title', 'contact.name': 'name', 'contact.firm': 'firm', 'contact.email': 'email', 'contact.countryCode': 'country', 'contact.vatNumber': 'vatNumber', 'contact.remarks': 'remarks',
}
const NEED_PATHS: Readonly<Record<OrderDraft['knows'], Record<string, OrderFieldName>>> = {
  'two-loads': {
    'requirement.need.first.forceN': 'firstForce', 'requirement.need.first.lengthMm': 'firstLength', 'requirement.need.second.forceN': 'secondForce', 'requirement.need.second.lengthMm': 'secondLength',
  },
  'load-and-rate': { 'requirement.need.load.forceN': 'firstForce', 'requirement.need.load.lengthMm': 'firstLength', 'requirement.need.rateNPerMm': 'rate' },
  'rate-and-length': { 'requirement.need.rateNPerMm': 'rate', 'requirement.need.freeLengthMm': 'freeLength', 'requirement.need.shortestLengthMm': 'shortestLength' },
}

/** The number of an SI value as one would type it in `units`: no more places than a caliper reads, no trailing noughts. */
export function typedNumber(valueSi: number, quantity: Quantity, units: UnitSystem): string {
  const shown = fromSi(valueSi, quantity, units)
  const places = quantity === 'temperature' ? 1 : units === 'inch' && quantity === 'length' ? 4 : Math.abs(shown) >= 100 ? 2 : 3
  return String(Number(shown.toFixed(places)))
}

/** Rewrites the typed sizes, loads and temperatures of a draft in other units; what could not be read stays as it was typed. */
export function convertDraft(draft: OrderDraft, { from, to, written }: { from: UnitSystem, to: UnitSystem, written: WrittenBySystem }): { draft: OrderDraft, written: WrittenBySystem } {
  const converted = { ...draft }
  const nowWritten: WrittenBySystem = {}
  for (const field of ORDER_FIELD_NAMES) {
    const quantity = quantityOf(field)
    if (!quantity || field === 'certificate' || field === 'knows') continue
    const text = draft[field]
    const kept = written[field]
    const parsed = kept?.text === text ? { ok: true, value: kept.valueSi } as const : parseQuantity(text, quantity, from)
    if (!parsed.ok) continue
    converted[field] = typedNumber(parsed.value, quantity, to)
    nowWritten[field] = { text: converted[field], valueSi: parsed.value }
  }
  return { draft: converted, written: nowWritten }
}

/** What is still to be filled in before the form can be sent, in the order of the page. */
export function missingFields(draft: OrderDraft): OrderFieldName[] {
  const needed: OrderFieldName[] = [...NEED_FIELDS[draft.knows], 'couldHurt', ...(QUANTITY_FIELDS.every(field => draft[field].trim() === '') ? ['quantity1' as const] : []), 'title', 'name', 'firm', 'email']
  return needed.filter(field => String(draft[field]).trim() === '')
}

/**
 * The body of a preview, or null while the spring itself is not described or something typed cannot be read. Whether a
 * break could hurt someone is asked anyway; until it is answered the price is the one for no.
 */
export function previewBody(draft: OrderDraft, read: ReadDraft): { requirement: Record<string, unknown>, countryCode: CountryCode } | null {
  if (Object.keys(read.faults).length > 0) return null
  const isDescribed = NEED_FIELDS[draft.knows].every(field => read.valuesSi[field] !== undefined)
  const { quantities } = read.requirement
  if (!isDescribed || !Array.isArray(quantities) || quantities.length === 0) return null
  return { requirement: { ...read.requirement, couldHurt: draft.couldHurt || 'no' }, countryCode: draft.country as CountryCode }
}
