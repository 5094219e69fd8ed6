import { fromSi, unitSymbol, type Quantity, type UnitSystem } from './convert'

/** U+202F stands between a number and its unit and between groups of thousands; a line never breaks at it. */
export const THIN_SPACE = '\u202f'

/** What is written where there is no finite value. */
const NO_VALUE = '–'

interface FormatOptions {
  /** Places after the decimal mark; without it each quantity has its usual number. */
  readonly decimals?: number
  /** False leaves the unit off, for a table whose head carries it. */
  readonly unit?: boolean
}

/** A number with fixed places, thousands grouped by a thin space, a true minus sign; an en dash if it is not finite. */
export function formatNumber(value: number, decimals = 0): string {
  if (!Number.isFinite(value)) return NO_VALUE
  const fixed = Math.abs(value).toFixed(decimals)
  const [whole = '', part] = fixed.split('.')
  const grouped = whole.length > 3 && !whole.includes('e') ? whole.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE) : whole
  return (value < 0 && Number(fixed) !== 0 ? '\u2212' : '') + grouped + (part ? '.' + part : '')
}

/** Places that give a value about four figures: 1 204, 150.7, 60.3, 6.03, 0.603. */
export function decimalsFor(value: number): number {
  const size = Math.abs(value)
  return size >= 1000 ? 0 : size >= 10 ? 1 : size >= 1 ? 2 : 3
}

function format(value: number, quantity: Quantity, units: UnitSystem, usualDecimals: number | undefined, options: FormatOptions): string {
  const shown = fromSi(value, quantity, units)
  const text = formatNumber(shown, options.decimals ?? usualDecimals ?? decimalsFor(shown))
  return options.unit === false || text === NO_VALUE ? text : text + THIN_SPACE + unitSymbol(quantity, units)
}

/** A length in mm (1 place) or inch (3 places). */
export function formatLength(lengthMm: number, units: UnitSystem, options: FormatOptions = {}): string {
  return format(lengthMm, 'length', units, units === 'inch' ? 3 : 1, options)
}

/** A wire diameter in mm (2 places, 3 under 0.1 mm) or inch (4 places). */
export function formatWireDiameter(wireDiameterMm: number, units: UnitSystem, options: FormatOptions = {}): string {
  return format(wireDiameterMm, 'length', units, units === 'inch' ? 4 : wireDiameterMm < 0.1 ? 3 : 2, options)
}

/** A force in N or lbf, to about four figures. */
export function formatForce(forceN: number, units: UnitSystem, options: FormatOptions = {}): string {
  return format(forceN, 'force', units, undefined, options)
}

/** A rate in N/mm or lbf/in, to about four figures but with two places up to 100. */
export function formatRate(rateNPerMm: number, units: UnitSystem, options: FormatOptions = {}): string {
  const shown = Math.abs(fromSi(rateNPerMm, 'rate', units))
  return format(rateNPerMm, 'rate', units, shown >= 1 && shown < 100 ? 2 : undefined, options)
}

/** A moment in N mm or lbf in, to about four figures. */
export function formatMoment(momentNmm: number, units: UnitSystem, options: FormatOptions = {}): string {
  return format(momentNmm, 'moment', units, undefined, options)
}

/** A rate of turning in N mm or lbf in for each degree, to about four figures. */
export function formatMomentRate(rateNmmPerDeg: number, units: UnitSystem, options: FormatOptions = {}): string {
  return format(rateNmmPerDeg, 'momentRate', units, undefined, options)
}

/** An angle in degrees (1 place); its sign stands close to the number. */
export function formatAngle(angleDeg: number, options: Pick<FormatOptions, 'decimals'> = {}): string {
  const text = formatNumber(angleDeg, options.decimals ?? 1)
  return text === NO_VALUE ? text : `${text}°`
}

/** A stress in MPa (no places) or ksi (1 place). */
export function formatStress(stressMpa: number, units: UnitSystem, options: FormatOptions = {}): string {
  return format(stressMpa, 'stress', units, units === 'inch' ? 1 : 0, options)
}

/** A mass in g, from 1 000 g in kg; or in oz, from 16 oz in lb. */
export function formatMass(massG: number, units: UnitSystem, options: FormatOptions = {}): string {
  const shown = fromSi(massG, 'mass', units)
  const [perLarge, large] = units === 'inch' ? [16, 'lb'] : [1000, 'kg']
  if (!(Math.abs(shown) >= perLarge)) return format(massG, 'mass', units, undefined, options)
  const text = formatNumber(shown / perLarge, options.decimals ?? decimalsFor(shown / perLarge))
  return options.unit === false || text === NO_VALUE ? text : text + THIN_SPACE + large
}

/** A temperature in °C or °F, no places. */
export function formatTemperature(temperatureC: number, units: UnitSystem, options: FormatOptions = {}): string {
  return format(temperatureC, 'temperature', units, 0, options)
}

/** A share of one as a percentage, no places: 0.33 is '33 %'. */
export function formatShare(share: number, decimals = 0): string {
  const text = formatNumber(share * 100, decimals)
  return text === NO_VALUE ? text : text + THIN_SPACE + '%'
}
