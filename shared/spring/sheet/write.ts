import type { UnitSystem } from '../../units/convert'
import {
  formatAngle, formatForce, formatLength, formatMass, formatMoment, formatMomentRate, formatNumber, formatRate, formatShare, formatStress, formatTemperature, formatWireDiameter,
  THIN_SPACE,
} from '../../units/format'
import type { SheetQuantity } from './types'

/** Counts and ratios without noughts that say nothing. */
const trimmed = (value: number, decimals: number): string => {
  const text = formatNumber(value, decimals)
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text
}
const withUnit = (text: string, unit: string): string => text + THIN_SPACE + unit
const fewFigures = (value: number): string => {
  const size = Math.abs(value)
  return formatNumber(value, size >= 100 ? 0 : size >= 10 ? 1 : 2)
}

const WRITERS: Readonly<Record<SheetQuantity, (value: number, units: UnitSystem) => string>> = {
  wire: formatWireDiameter,
  length: (value, units) => formatLength(value, units, { decimals: units === 'inch' ? 3 : 2 }),
  fineLength: (value, units) => formatLength(value, units, { decimals: units === 'inch' ? 4 : 3 }),
  force: formatForce,
  rate: formatRate,
  moment: formatMoment,
  momentRate: formatMomentRate,
  angle: value => formatAngle(value),
  stress: formatStress,
  mass: formatMass,
  temperature: formatTemperature,
  coils: value => trimmed(value, 3),
  ratio: value => formatNumber(value, 3),
  share: value => formatShare(value, 1),
  cycles: value => formatNumber(value, 0),
  perMinute: value => withUnit(trimmed(value, 2), 'per minute'),
  frequency: value => withUnit(fewFigures(value), 'Hz'),
  // a foot is 0.3048 m
  speed: (value, units) => (units === 'inch' ? withUnit(fewFigures(value / 0.3048), 'ft/s') : withUnit(fewFigures(value), 'm/s')),
  // lb/in3: one is 27 679.9 kg/m3, from the pound and the inch
  density: (value, units) => (units === 'inch' ? withUnit(formatNumber(value * 0.0254 ** 3 / 0.45359237, 4), 'lb/in³') : withUnit(formatNumber(value, 0), 'kg/m³')),
  perKelvin: value => withUnit(`${formatNumber(value * 100, 3)}${THIN_SPACE}%`, 'per kelvin'),
}

/** What is written for no value. */
export const NONE = 'none'

/** A value of the sheet as page and paper write it. A word stands as it is. */
export function writeSheetValue(value: number | string | null, quantity: SheetQuantity, units: UnitSystem): string {
  if (value === null) return NONE
  return typeof value === 'string' ? value : WRITERS[quantity](value, units)
}

/** A piece of a symbol or formula. */
export interface FormulaRun {
  readonly text: string
  readonly style?: 'index' | 'power'
}

/** Cuts `R = G d^4/(8 D^3 n_t)` at its powers and indices: a mark and the letters, digits, commas and signs next to it. */
export function formulaRuns(formula: string): FormulaRun[] {
  const runs: FormulaRun[] = []
  let from = 0
  for (const match of formula.matchAll(/([_^])(-?[\p{L}\d]+(?:,[\p{L}\d]+)*)/gu)) {
    if (match.index > from) runs.push({ text: formula.slice(from, match.index) })
    runs.push({ text: match[2] ?? '', style: match[1] === '_' ? 'index' : 'power' })
    from = match.index + match[0].length
  }
  if (from < formula.length) runs.push({ text: formula.slice(from) })
  return runs
}
