import type { StoredDesign } from '#shared/schemas/quote'
import type { UnitSystem } from '#shared/units/convert'
import { formatForce, formatLength, formatNumber, formatRate, formatStress, formatWireDiameter, THIN_SPACE } from '#shared/units/format'
import { FATIGUE_CYCLES } from '#shared/spring/mechanics/fatigue'
import { wireDiameterToleranceMm } from '#shared/spring/materials/wire-tolerance'
import { ENDS_WORDS } from './choice-words'

/** One row of 'What is made': the words, the symbol of the standard (`L_0` is an L with an index), the value, and its tolerance or limit. */
export type QuoteRow = { name: string, symbol: string, value: string, limit: string, isWide?: boolean }

const ORDINALS = ['First', 'Second', 'Third', 'Fourth', 'Fifth', 'Sixth']
const NO_UNIT = { unit: false }
/** Coil counts with no more places than they have. */
const coils = (count: number): string => formatNumber(count, 2).replace(/\.?0+$/, '')

/** Everything that is made and promised, as EN ISO 26909 and EN 13906-1 name it. Lengths carry no unit: the sheet says it once. */
export function quoteRows(design: StoredDesign, { units, strokes, strokesPerMinute }: { units: UnitSystem, strokes: number, strokesPerMinute: number }): QuoteRow[] {
  const { evaluation } = design
  const length = (mm: number) => formatLength(mm, units, NO_UNIT)
  const plusMinus = (name: string, write: (value: number) => string) => {
    const found = evaluation.tolerances.find(one => one.quantity === name)
    return found ? `±${write(found.plusMinus)}` : ''
  }
  const fine = (mm: number) => formatLength(mm, units, { unit: false, decimals: units === 'inch' ? 4 : 2 })
  const stresses = (list: readonly number[]) => `${list.map(stress => formatStress(stress, units, NO_UNIT)).join(', ')}${THIN_SPACE}${units === 'inch' ? 'ksi' : 'MPa'}`
  const { points, fatigue } = evaluation
  const indexed = (symbol: string) => points.map((_, at) => `${symbol}${at + 1}`).join(', ')

  const rows: QuoteRow[] = [
    { name: 'Wire', symbol: 'd', value: formatWireDiameter(design.wireDiameterMm, units, NO_UNIT), limit: `±${formatLength(wireDiameterToleranceMm(design.wireDiameterMm), units, { unit: false, decimals: units === 'inch' ? 4 : 3 })}` },
    { name: 'Mean diameter', symbol: 'D', value: fine(design.meanDiameterMm), limit: plusMinus('meanDiameterMm', fine) },
    { name: 'Outside, inside diameter', symbol: 'D_e, D_i', value: `${fine(evaluation.outerDiameterMm)}, ${fine(evaluation.innerDiameterMm)}`, limit: plusMinus('outerDiameterMm', fine) },
    { name: 'Active, total coils', symbol: 'n, n_t', value: `${coils(design.activeCoils)}, ${coils(design.totalCoils)}`, limit: '' },
    { name: 'Free length', symbol: 'L_0', value: length(design.freeLengthMm), limit: points.length > 1 ? 'for information' : plusMinus('freeLengthMm', fine) },
    ...points.map((point, at): QuoteRow => ({
      name: points.length > 1 ? `${ORDINALS[at] ?? `Load ${at + 1}`} load, at ${formatLength(point.lengthMm, units)}` : `Load, at ${formatLength(point.lengthMm, units)}`,
      symbol: `F_${at + 1}`, value: formatForce(point.forceN, units), limit: plusMinus(`force${at + 1}N`, force => formatForce(force, units)),
    })),
    { name: 'Least working length', symbol: 'L_n', value: length(evaluation.shortestLengthMm), limit: '' },
    { name: 'Solid length', symbol: 'L_c', value: length(evaluation.solidLengthMm), limit: 'at most' },
    { name: 'Rate', symbol: 'R', value: formatRate(evaluation.rateNPerMm, units), limit: '' },
  ]
  if (points.length > 0) {
    rows.push(
      { name: points.length > 1 ? 'Stress at the loads' : 'Stress at the load', symbol: indexed('τ_'), value: stresses(points.map(point => point.stressMpa)), limit: '' },
      { name: 'the same, corrected', symbol: indexed('τ_k'), value: stresses(points.map(point => point.correctedStressMpa)), limit: `k = ${formatNumber(evaluation.stressCorrectionFactor, 3)}` },
    )
  }
  rows.push({ name: 'Stress when solid', symbol: 'τ_c', value: stresses([evaluation.solid.stressMpa]), limit: evaluation.allowableStressMpa === null ? '' : `${formatStress(evaluation.allowableStressMpa, units, NO_UNIT)} allowed` })
  const squareness = evaluation.tolerances.find(one => one.quantity === 'squarenessMm')
  const parallelism = evaluation.tolerances.find(one => one.quantity === 'parallelismMm')
  if (squareness && parallelism) rows.push({ name: 'Squareness, parallelism', symbol: 'e_1, e_2', value: `${fine(squareness.plusMinus)}, ${fine(parallelism.plusMinus)}`, limit: 'at most' })
  rows.push(
    { name: 'Load cycles', symbol: 'N', value: formatNumber(strokes), limit: fatigue && strokes >= FATIGUE_CYCLES ? `reserve ${formatNumber(fatigue.safetyFactor, 2)}` : '' },
    { name: 'Own frequency', symbol: 'f_e', value: `${formatNumber(evaluation.naturalFrequencyHz)}${THIN_SPACE}Hz`, limit: strokesPerMinute > 0 ? `works at ${formatNumber(strokesPerMinute / 60, strokesPerMinute < 60 ? 2 : 0)}${THIN_SPACE}Hz` : '' },
    { name: 'Material', symbol: '', value: `${design.materialName}${evaluation.tensileStrengthMpa === null ? '' : `, Rm ${formatStress(evaluation.tensileStrengthMpa, units)}`}`, limit: '', isWide: true },
    { name: 'Ends, hand', symbol: '', value: `${ENDS_WORDS[design.ends].toLowerCase()}, ${design.hand}-hand`, limit: '', isWide: true },
  )
  return rows
}
