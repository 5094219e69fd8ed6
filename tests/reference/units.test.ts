import { spawnSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'
import { DISPLAY_UNITS, fromSi, toSi, type Quantity } from '#shared/units/convert'
import { parseQuantity } from '#shared/units/parse'
import { writeSheetValue } from '#shared/spring/sheet'

/*
 * Every unit that can be typed and every unit that is shown, against GNU units (Debian package `units`). It fails, and does not
 * skip, where the program is absent.
 */
function gnuUnits(from: string, to: string): number {
  const run = spawnSync('units', ['--terse', '--digits', '15', from, to], { encoding: 'utf8' })
  if (run.error) throw new Error(`units did not run: install the Debian package units (${run.error.message})`)
  const value = Number(run.stdout.trim())
  if (run.status !== 0 || Number.isNaN(value)) throw new Error(`units does not know ${from} in ${to}: ${run.stdout}${run.stderr}`)
  return value
}

/** What a quantity is inside, in the words of GNU units. */
const INSIDE: Readonly<Record<Exclude<Quantity, 'temperature'>, string>> = {
  length: 'mm', force: 'N', rate: 'N/mm', moment: 'N mm', momentRate: 'N mm/degree', angle: 'degree', stress: 'MPa', mass: 'g',
}

// As typed here, and as GNU units calls it.
const TYPED: readonly (readonly [Exclude<Quantity, 'temperature'>, string, string])[] = [
  ['length', 'mm', 'mm'], ['length', 'cm', 'cm'], ['length', 'm', 'm'], ['length', 'µm', 'micron'], ['length', 'in', 'inch'], ['length', 'thou', 'mil'], ['length', 'ft', 'ft'],
  ['force', 'N', 'N'], ['force', 'kN', 'kN'], ['force', 'mN', 'mN'], ['force', 'daN', 'daN'], ['force', 'lbf', 'lbf'], ['force', 'ozf', 'oz force'], ['force', 'kgf', 'kgf'], ['force', 'gf', 'g force'],
  ['rate', 'N/mm', 'N/mm'], ['rate', 'N/cm', 'N/cm'], ['rate', 'N/m', 'N/m'], ['rate', 'lbf/in', 'lbf/inch'], ['rate', 'kgf/mm', 'kgf/mm'], ['rate', 'kgf/cm', 'kgf/cm'],
  ['moment', 'N·mm', 'N mm'], ['moment', 'N·cm', 'N cm'], ['moment', 'N·m', 'N m'], ['moment', 'lbf·in', 'lbf inch'], ['moment', 'lbf·ft', 'lbf ft'], ['moment', 'ozf·in', 'oz force inch'], ['moment', 'kgf·cm', 'kgf cm'],
  ['momentRate', 'N·mm/°', 'N mm/degree'], ['momentRate', 'N·m/°', 'N m/degree'], ['momentRate', 'N·mm/rad', 'N mm/radian'], ['momentRate', 'N·m/rad', 'N m/radian'], ['momentRate', 'lbf·in/°', 'lbf inch/degree'],
  ['momentRate', 'lbf·in/rad', 'lbf inch/radian'], ['momentRate', 'N·mm/turn', 'N mm/turn'], ['momentRate', 'lbf·in/turn', 'lbf inch/turn'],
  ['angle', '°', 'degree'], ['angle', 'rad', 'radian'], ['angle', 'turn', 'turn'],
  ['stress', 'MPa', 'MPa'], ['stress', 'GPa', 'GPa'], ['stress', 'kPa', 'kPa'], ['stress', 'psi', 'psi'], ['stress', 'ksi', 'ksi'], ['stress', 'kgf/mm2', 'kgf/mm^2'],
  ['mass', 'g', 'g'], ['mass', 'kg', 'kg'], ['mass', 'mg', 'mg'], ['mass', 'lb', 'lb'], ['mass', 'oz', 'oz'],
]

describe('units against GNU units', () => {
  it.each(TYPED)('a %s typed in %s is what GNU units says', (quantity, unit, gnu) => {
    const parsed = parseQuantity(`1 ${unit}`, quantity, 'metric')
    if (!parsed.ok) throw new Error(parsed.message)
    expect(Math.abs(parsed.value / gnuUnits(gnu, INSIDE[quantity]) - 1)).toBeLessThan(1e-12)
  })

  const SHOWN: Readonly<Record<string, string>> = { 'N·mm': 'N mm', 'N·mm/°': 'N mm/degree', 'lbf·in': 'lbf inch', 'lbf·in/°': 'lbf inch/degree', '°': 'degree', 'in': 'inch', 'lbf/in': 'lbf/inch' }
  const shown = (['metric', 'inch'] as const).flatMap(system => (Object.keys(INSIDE) as (keyof typeof INSIDE)[]).map(quantity => [system, quantity, DISPLAY_UNITS[system][quantity].symbol] as const))
  it.each(shown)('%s shows a %s in %s as GNU units would, there and back', (system, quantity, symbol) => {
    const factor = gnuUnits(INSIDE[quantity], SHOWN[symbol] ?? symbol)
    expect(fromSi(12.5, quantity, system) / (12.5 * factor)).toBeCloseTo(1, 12)
    expect(toSi(fromSi(12.5, quantity, system), quantity, system)).toBeCloseTo(12.5, 12)
  })

  it.each([['density', 7850, 'kg/m^3', 'lb/inch^3', 3], ['speed', 2.5, 'm/s', 'ft/s', 2]] as const)('the data sheet writes a %s in inch units as GNU units would', (quantity, value, inside, shown, decimals) => {
    const written = Number.parseFloat(writeSheetValue(value, quantity, 'inch'))
    expect(written).toBeCloseTo(value * gnuUnits(inside, shown), decimals)
  })

  it.each([-40, 0, 20, 37.5, 250])('%d degrees Celsius is the Fahrenheit and the kelvin of GNU units', (celsius) => {
    expect(fromSi(celsius, 'temperature', 'inch')).toBeCloseTo(gnuUnits(`tempC(${celsius})`, 'tempF'), 9)
    const kelvin = parseQuantity(`${gnuUnits(`tempC(${celsius})`, 'K')} K`, 'temperature', 'metric')
    expect(kelvin.ok && kelvin.value).toBeCloseTo(celsius, 9)
  })
})
