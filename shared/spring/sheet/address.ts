import type { Quantity, UnitSystem } from '../../units/convert'
import { parseNumber, parseQuantity, type Parsed } from '../../units/parse'
import { SPRING_KINDS, type SpringKind } from '../codes'
import type { SpringInput } from '../mechanics/spring'
import { ADDRESS_UNITS, paramsOf, pointFormsOf, type AddressParam } from './address-params'

/**
 * A spring in the query of an address: `kind=compression&d=2.5mm&D=20mm&n=8.25&L0=60mm&p1=L50mm&p2=F120N`. A value carries its
 * unit, so that it means the same to everybody; without one it is taken as SI.
 */
export type SpringQuery = Readonly<Record<string, string>>

/** A query as far as it could be read: a request to validate, and what could not be read by parameter. */
export interface ReadAddress {
  readonly kind: SpringKind | null
  readonly request: Readonly<Record<string, unknown>>
  readonly faults: Readonly<Record<string, string>>
  /** The parameter a path of the request was read from, or would be. */
  readonly paramAt: (path: readonly PropertyKey[]) => string
}

const LONGEST_VALUE = 60
const MOST_UNKNOWN = 10

const isKind = (text: string | undefined): text is SpringKind => SPRING_KINDS.some(kind => kind === text)

/** Reads a query; never throws, whatever it holds. Empty values count as absent. */
export function readAddress(query: SpringQuery): ReadAddress {
  const faults: Record<string, string> = {}
  const kind = isKind(query.kind) ? query.kind : null
  if (!kind) {
    faults.kind = query.kind ? 'The kind must be compression, extension or torsion.' : 'The kind is missing: compression, extension or torsion.'
    return { kind, request: {}, faults, paramAt: () => 'kind' }
  }
  const params = paramsOf(kind)
  const known = new Set(['kind', ...params.map(({ name }) => name)])
  for (const name of Object.keys(query).filter(name => !known.has(name)).slice(0, MOST_UNKNOWN)) faults[name.slice(0, 40)] = 'Not known here.'

  const request: Record<string, unknown> = { kind }
  const points: unknown[] = []
  const legs: Record<string, unknown>[] = []
  const paramOfPath = new Map<string, string>([['kind', 'kind']])
  for (const param of params) {
    const path = param.paths[kind] ?? ''
    paramOfPath.set(path, param.name)
    const text = Object.hasOwn(query, param.name) ? (query[param.name] ?? '').trim() : ''
    if (text === '') continue
    const read = text.length > LONGEST_VALUE ? { ok: false, fault: 'not-a-number', message: `${text.slice(0, 12)}… is too long.` } as const : readValue(param, text, kind)
    if (!read.ok) faults[param.name] = read.message
    else if (param.form.is === 'point') {
      paramOfPath.set(`points.${points.length}`, param.name)
      points.push(read.value)
    }
    else if (path.startsWith('legs.')) setLeg(legs, path, read.value)
    else setAt(request, path, read.value)
  }
  if (points.length > 0) request.points = points
  const givenLegs = legs.flatMap((leg, i) => {
    if (leg.lengthMm !== undefined) return [{ leg: { form: 'tangential', ...leg }, i }]
    const name = `leg${i + 1}`
    if (leg.form !== undefined && !(name in faults)) faults[name] = 'Give the length of this leg too.'
    return []
  })
  givenLegs.forEach(({ i }, at) => {
    paramOfPath.set(`legs.${at}.lengthMm`, `leg${i + 1}`)
    paramOfPath.set(`legs.${at}.form`, `leg${i + 1}form`)
  })
  if (givenLegs.length > 0) request.legs = givenLegs.map(({ leg }) => leg)
  // A radius alone means the usual hooks
  if (typeof request.hook === 'object' && request.hook !== null && !('form' in request.hook)) setAt(request, 'hook.form', 'full-loop')
  return { kind, request, faults, paramAt: path => nearest(path, paramOfPath) }
}

/** Paths may go deeper than a parameter (`points.1.lengthMm`) or end before it (`duty`). */
function nearest(path: readonly PropertyKey[], paramOfPath: ReadonlyMap<string, string>): string {
  for (let length = path.length; length > 0; length -= 1) {
    const found = paramOfPath.get(path.slice(0, length).join('.'))
    if (found) return found
  }
  return 'kind'
}

function setAt(target: Record<string, unknown>, path: string, value: unknown): void {
  const [first = '', second] = path.split('.')
  if (second === undefined) target[first] = value
  else target[first] = { ...(typeof target[first] === 'object' ? target[first] : {}), [second]: value }
}

function setLeg(legs: Record<string, unknown>[], path: string, value: unknown): void {
  const [, index = '0', field = ''] = path.split('.')
  while (legs.length <= Number(index)) legs.push({})
  legs[Number(index)] = { ...legs[Number(index)], [field]: value }
}

const refuse = (message: string) => ({ ok: false, fault: 'not-a-number', message }) as const

function readValue({ form }: AddressParam, text: string, kind: SpringKind): Parsed<unknown> {
  switch (form.is) {
    case 'quantity': return parseQuantity(text, form.quantity, 'metric')
    case 'count': return parseNumber(text)
    case 'choice': {
      const value = form.values.find(one => String(one) === text)
      return value === undefined ? refuse(`'${text.slice(0, 40)}' is not one of: ${form.values.join(', ')}.`) : { ok: true, value }
    }
    case 'flag':
      return text === form.yes || text === form.no ? { ok: true, value: text === form.yes } : refuse(`'${text.slice(0, 40)}' is neither ${form.yes} nor ${form.no}.`)
    case 'point': return readPoint(text, kind)
  }
}

/** A point: a letter for what is given and the value; without the letter the first quantity that its unit fits. */
function readPoint(text: string, kind: SpringKind): Parsed<unknown> {
  const forms = pointFormsOf(kind)
  const lettered = forms.find(({ letter }) => text.startsWith(letter))
  if (lettered) {
    const parsed = parseQuantity(text.slice(lettered.letter.length), lettered.quantity, 'metric')
    return parsed.ok ? { ok: true, value: { [lettered.field]: parsed.value } } : parsed
  }
  let first: Parsed<number> | undefined
  for (const { field, quantity } of forms) {
    const parsed = parseQuantity(text, quantity, 'metric')
    if (parsed.ok) return { ok: true, value: { [field]: parsed.value } }
    first ??= parsed
  }
  return first ?? refuse('Nothing is written here.')
}

/** A number and its unit; a space keeps an exponent from running into the unit. */
const withUnit = (number: string, unit: string): string => number + (/e/i.test(number) ? ' ' : '') + unit

/** An SI value as an address holds it. */
export const siText = (value: number, quantity: Quantity): string => withUnit(String(value), ADDRESS_UNITS.metric[quantity])

/** What a person typed into a field, as an address holds it: a number alone gets the unit of the field; anything else stays as it is. */
export function typedText(typed: string, quantity: Quantity, units: UnitSystem): string {
  const text = typed.trim()
  return text !== '' && parseNumber(text).ok ? withUnit(text, ADDRESS_UNITS[units][quantity]) : text
}

function valueAt(spring: SpringInput, path: string): unknown {
  let value: unknown = spring
  for (const step of path.split('.')) value = typeof value === 'object' && value !== null ? Reflect.get(value, step) : undefined
  return value
}

function writeValue({ form }: AddressParam, value: unknown, kind: SpringKind): string {
  if (form.is === 'flag') return value === true ? form.yes : form.no
  if (form.is === 'quantity') return typeof value === 'number' ? siText(value, form.quantity) : ''
  if (form.is !== 'point') return String(value)
  const { letter, field, quantity } = pointFormsOf(kind).find(one => typeof value === 'object' && value !== null && one.field in value) ?? { letter: '', field: '', quantity: 'length' as const }
  const number: unknown = typeof value === 'object' && value !== null ? Reflect.get(value, field) : undefined
  return typeof number === 'number' ? letter + siText(number, quantity) : ''
}

/** The query that stands for a spring; `readAddress` gives the same spring again. */
export function writeAddress(spring: SpringInput): Record<string, string> {
  const query: Record<string, string> = { kind: spring.kind }
  for (const param of paramsOf(spring.kind)) {
    const value = valueAt(spring, param.paths[spring.kind] ?? '')
    const text = value === undefined ? '' : writeValue(param, value, spring.kind)
    if (text !== '') query[param.name] = text
  }
  return query
}
