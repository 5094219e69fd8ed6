import type { CompressionNeed, ExtensionNeed, TorsionNeed } from '#shared/schemas/enquiry'
import type { SpringKind } from '#shared/spring/codes'
import type { CountryCode } from '#shared/countries'
import { fromSi, type Quantity, type UnitSystem } from '#shared/units/convert'
import { parseNumber, parseQuantity } from '#shared/units/parse'
import { parseDay } from './day-words'
import { ORDER_FIELD_NAMES, QUANTITY_FIELDS, quantityOf, type OrderChoiceName, type OrderFieldName } from './order-fields'
import { knowsOf, NEED_FIELDS, needFieldsOf, NEED_PATHS, readNeed } from './order-need'

/** The order form as typed: text in the units the person uses. */
export type OrderDraft = Record<Exclude<OrderFieldName, OrderChoiceName>, string> & {
  kind: SpringKind, certificate: boolean, knows: CompressionNeed['knows'], knowsExtension: ExtensionNeed['knows'], knowsTorsion: TorsionNeed['knows'], website: string,
}

export const emptyDraft = (): OrderDraft => ({
  kind: 'compression', knows: 'two-loads', knowsExtension: 'two-loads', knowsTorsion: 'two-moments',
  firstForce: '', firstLength: '', secondForce: '', secondLength: '', rate: '', freeLength: '', shortestLength: '',
  firstMoment: '', firstAngle: '', secondMoment: '', secondAngle: '', turnRate: '', firstLeg: '', secondLeg: '', legForm: 'tangential', load: 'winds-up', hook: 'full-loop',
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

const ALL_NEED_FIELDS = new Set<OrderFieldName>(Object.values(NEED_FIELDS).flat())

/** True for a field that the draft's kind and way of knowing do not ask for: what stands in it is left alone. */
function isIdle(field: OrderFieldName, draft: OrderDraft): boolean {
  if (ALL_NEED_FIELDS.has(field)) return !needFieldsOf(draft).includes(field)
  return field === 'shortestRoom' && draft.kind !== 'compression'
}

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
    if (!quantity || isIdle(field, draft)) continue
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

  const fieldOfPath: ReadDraft['fieldOfPath'] = { ...PATHS, ...NEED_PATHS[`${draft.kind}:${knowsOf(draft)}`] }
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
    kind: draft.kind, need: readNeed(draft, valuesSi),
    boreMm: valuesSi.bore, rodMm: valuesSi.rod, maxFreeLengthMm: valuesSi.longest, hand: draft.hand,
    surroundings: draft.surroundings, coldestC: valuesSi.coldest, hottestC: valuesSi.hottest, strokes: count('strokes'), strokesPerMinute: count('strokesPerMinute'),
    couldHurt: draft.couldHurt || undefined, material: draft.material, toleranceGrade: Number(draft.toleranceGrade), certificate: draft.certificate,
    quantities, neededOn: day?.ok ? day.day : undefined, ...kindPart(draft, valuesSi),
  }
  const contact = {
    title: draft.title, name: draft.name, firm: draft.firm, email: draft.email, countryCode: draft.country, vatNumber: draft.vatNumber.trim() || undefined, remarks: draft.remarks,
  }
  return { requirement, contact, faults, valuesSi, fieldOfPath }
}

function kindPart(draft: OrderDraft, { shortestRoom, firstLeg, secondLeg }: ReadDraft['valuesSi']): Record<string, unknown> {
  switch (draft.kind) {
    case 'compression': return { maxSolidLengthMm: shortestRoom, ends: draft.ends }
    case 'extension': return { hook: draft.hook }
    case 'torsion': return { firstLegMm: firstLeg, secondLegMm: secondLeg, legForm: draft.legForm, load: draft.load }
  }
}

const PATHS: Record<string, OrderFieldName> = {
  'requirement.boreMm': 'bore', 'requirement.rodMm': 'rod', 'requirement.maxFreeLengthMm': 'longest', 'requirement.maxSolidLengthMm': 'shortestRoom', 'requirement.hand': 'hand',
  'requirement.surroundings': 'surroundings', 'requirement.coldestC': 'coldest', 'requirement.hottestC': 'hottest', 'requirement.strokes': 'strokes', 'requirement.strokesPerMinute': 'strokesPerMinute',
  'requirement.couldHurt': 'couldHurt', 'requirement.material': 'material', 'requirement.ends': 'ends', 'requirement.toleranceGrade': 'toleranceGrade', 'requirement.certificate': 'certificate',
  'requirement.quantities': 'quantity1', 'requirement.neededOn': 'neededOn', 'requirement.need.knows': 'knows', 'requirement.need': 'knows', 'requirement.kind': 'kind',
  'requirement.hook': 'hook', 'requirement.firstLegMm': 'firstLeg', 'requirement.secondLegMm': 'secondLeg', 'requirement.legForm': 'legForm', 'requirement.load': 'load',
  'contact.title': 'title', 'contact.name': 'name', 'contact.firm': 'firm', 'contact.email': 'email', 'contact.countryCode': 'country', 'contact.vatNumber': 'vatNumber', 'contact.remarks': 'remarks',
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
    if (!quantity || isChoice(field)) continue
    const text = draft[field]
    const kept = written[field]
    const parsed = kept?.text === text ? { ok: true, value: kept.valueSi } as const : parseQuantity(text, quantity, from)
    if (!parsed.ok) continue
    converted[field] = typedNumber(parsed.value, quantity, to)
    nowWritten[field] = { text: converted[field], valueSi: parsed.value }
  }
  return { draft: converted, written: nowWritten }
}

/** True for a field that holds a choice or a tick, not text. */
export const isChoice = (field: OrderFieldName): field is OrderChoiceName => field === 'kind' || field === 'knows' || field === 'knowsExtension' || field === 'knowsTorsion' || field === 'certificate'

/** What is still to be filled in before the form can be sent, in the order of the page. */
export function missingFields(draft: OrderDraft): OrderFieldName[] {
  const needed: OrderFieldName[] = [...needFieldsOf(draft), 'couldHurt', ...(QUANTITY_FIELDS.every(field => draft[field].trim() === '') ? ['quantity1' as const] : []), 'title', 'name', 'firm', 'email']
  return needed.filter(field => String(draft[field]).trim() === '')
}

/**
 * The body of a preview, or null while the spring itself is not described or something typed cannot be read. Whether a
 * break could hurt someone is asked anyway; until it is answered the price is the one for no.
 */
export function previewBody(draft: OrderDraft, read: ReadDraft): { requirement: Record<string, unknown>, countryCode: CountryCode } | null {
  if (Object.keys(read.faults).length > 0) return null
  const isDescribed = needFieldsOf(draft).every(field => read.valuesSi[field] !== undefined)
  const { quantities } = read.requirement
  if (!isDescribed || !Array.isArray(quantities) || quantities.length === 0) return null
  return { requirement: { ...read.requirement, couldHurt: draft.couldHurt || 'no' }, countryCode: draft.country as CountryCode }
}
