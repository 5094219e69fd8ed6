import { DISPLAY_UNITS, type Quantity, type UnitSystem } from './convert'
import { findUnit } from './unit-names'

/** Why a typed value was not understood. */
export type ParseFault = 'empty' | 'not-a-number' | 'two-readings' | 'unknown-unit' | 'wrong-quantity' | 'out-of-range'

export type Parsed<Value> =
  | { readonly ok: true, readonly value: Value }
  | { readonly ok: false, readonly fault: ParseFault, readonly message: string }

const QUANTITY_WORDS: Record<Quantity, string> = {
  length: 'a length', force: 'a force', rate: 'a rate', moment: 'a moment', momentRate: 'a rate of turning', angle: 'an angle', stress: 'a stress', mass: 'a mass', temperature: 'a temperature',
}
const LONGEST_TEXT = 40
const VULGAR: Record<string, string> = {
  '½': '1/2', '¼': '1/4', '¾': '3/4', '⅛': '1/8', '⅜': '3/8', '⅝': '5/8', '⅞': '7/8', '⅓': '1/3', '⅔': '2/3',
}

/** Everything up to the last digit before the unit; the exponent of '2e3' belongs to it, the e of a unit does not. */
const NUMBER_AT_START = /^[+-]?[\d., /-]*\d[.,]?(?:e[+-]?\d+(?![a-z]))?/i

const fail = (fault: ParseFault, message: string) => ({ ok: false, fault, message }) as const

/** Brings marks of other keyboards to the plain ones: minus, spaces, vulgar fractions. */
function tidy(text: string): string {
  return text
    .replace(/[½¼¾⅛⅜⅝⅞⅓⅔]/g, (mark) => ' ' + (VULGAR[mark] ?? ''))
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/[\u2044]/g, '/')
    .replace(/[\u00a0\u2009\u202f\s]+/g, ' ')
    .trim()
}

/** A plain decimal number with point or comma, thousands grouped by space, comma or point; nothing else. */
function readDecimal(text: string): Parsed<number> {
  const notNumber = fail('not-a-number', `'${text}' is not a number. Write it as 12.5.`)
  const parts = /^([+-]? ?)([\d., ]*\d[\d., ]*?)(e[+-]?\d{1,3})?$/i.exec(text)
  if (!parts) return notNumber
  let digits = parts[2] ?? ''
  if (digits.includes(' ')) {
    if (!/^\d{1,3}( \d{3})+([.,]\d*)?$/.test(digits)) return notNumber
    digits = digits.replaceAll(' ', '')
    if (digits.includes(',')) digits = digits.replace(',', '.')
  }
  const commas = digits.split(',').length - 1
  const points = digits.split('.').length - 1
  if (commas && points) {
    const [group, mark] = digits.lastIndexOf(',') > digits.lastIndexOf('.') ? ['.', ','] : [',', '.']
    const [whole = '', part = '', ...more] = digits.split(mark)
    if (more.length || !whole.split(group).every((piece, i) => (i ? /^\d{3}$/ : /^\d{1,3}$/).test(piece))) return notNumber
    digits = whole.replaceAll(group, '') + '.' + part
  } else if (commas > 1 || points > 1) {
    if (!/^\d{1,3}([.,]\d{3})+$/.test(digits)) return notNumber
    digits = digits.replace(/[.,]/g, '')
  } else if (commas) {
    // '1,500' is one and a half in half of Europe and fifteen hundred in the other: ask, never guess
    if (/^[1-9]\d{0,2},\d{3}$/.test(digits)) {
      return fail('two-readings', `'${text}' can be read in two ways. Write ${digits.replace(',', '.')} or ${digits.replace(',', '')}.`)
    }
    digits = digits.replace(',', '.')
  }
  const value = Number((parts[1] ?? '').trim() + digits + (parts[3] ?? ''))
  return Number.isFinite(value) ? { ok: true, value } : fail('out-of-range', `'${text}' is too large.`)
}

/**
 * A typed number without a unit: '1,5', '.125', '1 000', '1 1/2', '3/8', '1½', '2e3'.
 * Faults: empty, not-a-number, two-readings ('1,500'), out-of-range.
 */
export function parseNumber(input: string): Parsed<number> {
  const text = tidy(input)
  if (!text) return fail('empty', 'Nothing is written here.')
  if (text.length > LONGEST_TEXT) return fail('not-a-number', 'This is too long for a number.')
  const fraction = /^([+-]?) ?(?:(\d+)[ -])?(\d+) ?\/ ?(\d+)$/.exec(text)
  if (!fraction) return readDecimal(text)
  const [, sign, whole = '0', top, bottom] = fraction
  if (Number(bottom) === 0) return fail('not-a-number', `'${text}' divides by nought.`)
  const value = (Number(whole) + Number(top) / Number(bottom)) * (sign === '-' ? -1 : 1)
  return Number.isFinite(value) ? { ok: true, value } : fail('out-of-range', `'${text}' is too large.`)
}

/**
 * A typed quantity to its SI value (mm, N, N/mm, MPa, g, °C): '1,5 mm', '.125"', '1 1/2 in', '12 lbf'.
 * A number alone is taken in the unit of `units`. Faults: those of parseNumber, unknown-unit, wrong-quantity.
 */
export function parseQuantity(input: string, quantity: Quantity, units: UnitSystem): Parsed<number> {
  const text = tidy(input)
  if (text.length > LONGEST_TEXT) return fail('not-a-number', 'This is too long for a number with its unit.')
  const numberText = NUMBER_AT_START.exec(text)?.[0] ?? text
  const typedUnit = text.slice(numberText.length).trim()
  const number = parseNumber(numberText)
  if (!number.ok) return number
  const unit = typedUnit ? findUnit(typedUnit, quantity) : { quantity, ...DISPLAY_UNITS[units][quantity] }
  if (!unit) {
    return fail('unknown-unit', `'${typedUnit}' is not a unit known here. Write ${QUANTITY_WORDS[quantity]} in ${DISPLAY_UNITS.metric[quantity].symbol} or ${DISPLAY_UNITS.inch[quantity].symbol}.`)
  }
  if (unit.quantity !== quantity) {
    const weight = quantity === 'force' && unit.quantity === 'mass' ? ` For the weight of a mass write ${typedUnit}f.` : ''
    return fail('wrong-quantity', `${typedUnit} is the unit of ${QUANTITY_WORDS[unit.quantity]}; ${QUANTITY_WORDS[quantity]} is asked for.${weight}`)
  }
  const value = number.value * unit.size + (unit.offset ?? 0)
  return Number.isFinite(value) ? { ok: true, value } : fail('out-of-range', `'${text}' is too large.`)
}
