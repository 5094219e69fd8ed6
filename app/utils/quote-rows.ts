import type { StoredDesign, StoredDesignOf } from '#shared/schemas/quote'
import { FATIGUE_CYCLES } from '#shared/spring/mechanics/fatigue'
import { wireDiameterToleranceMm } from '#shared/spring/materials/wire-tolerance'
import type { UnitSystem } from '#shared/units/convert'
import { formatAngle, formatForce, formatLength, formatMoment, formatMomentRate, formatNumber, formatRate, formatStress, formatWireDiameter, THIN_SPACE } from '#shared/units/format'
import { ENDS_WORDS, HOOK_CHOICES, LEG_CHOICES } from './choice-words'

/** One row of 'What is made': the words, the symbol of the standard (`L_0` is an L with an index), the value, and its tolerance or limit. */
export type QuoteRow = { name: string, symbol: string, value: string, limit: string, isWide?: boolean }
type Duty = { strokes: number, strokesPerMinute: number }

/** A limit is written rounded down to a tenth, never up, as the notes beside it are. */
const atMost = (value: number): number => Math.floor(value * 10) / 10
const ORDINALS = ['First', 'Second', 'Third', 'Fourth', 'Fifth', 'Sixth']
/** Keeps the degree sign of a rate beside its stroke at a line's end. */
const WORD_JOINER = '\u2060'
const NO_UNIT = { unit: false }
/** Coil counts with no more places than they have. */
const coils = (count: number): string => formatNumber(count, 2).replace(/\.?0+$/, '')

/** How values are written in the units of the sheet. */
function pens(design: StoredDesign, units: UnitSystem) {
  const fine = (mm: number) => formatLength(mm, units, { unit: false, decimals: units === 'inch' ? 4 : 2 })
  return {
    fine,
    length: (mm: number) => formatLength(mm, units, NO_UNIT),
    stress: (mpa: number) => formatStress(mpa, units, NO_UNIT),
    stresses: (list: readonly number[]) => `${list.map(stress => formatStress(stress, units, NO_UNIT)).join(', ')}${THIN_SPACE}${units === 'inch' ? 'ksi' : 'MPa'}`,
    plusMinus: (name: string, write: (value: number) => string) => {
      const found = design.evaluation.tolerances.find(one => one.quantity === name)
      return found ? `±${write(found.plusMinus)}` : ''
    },
  }
}
type Pens = ReturnType<typeof pens>

function wireRows(design: StoredDesign, units: UnitSystem, { fine, plusMinus }: Pens): QuoteRow[] {
  const { evaluation } = design
  return [
    { name: 'Wire', symbol: 'd', value: formatWireDiameter(design.wireDiameterMm, units, NO_UNIT), limit: `±${formatLength(wireDiameterToleranceMm(design.wireDiameterMm), units, { unit: false, decimals: units === 'inch' ? 4 : 3 })}` },
    { name: 'Mean diameter', symbol: 'D', value: fine(design.meanDiameterMm), limit: plusMinus('meanDiameterMm', fine) },
    { name: 'Outside, inside diameter', symbol: 'D_e, D_i', value: `${fine(evaluation.outerDiameterMm)}, ${fine(evaluation.innerDiameterMm)}`, limit: plusMinus('outerDiameterMm', fine) },
  ]
}

function dutyRows(design: StoredDesign, units: UnitSystem, { strokes }: Duty): QuoteRow[] {
  const { fatigue, tensileStrengthMpa } = design.evaluation
  return [
    { name: 'Load cycles', symbol: 'N', value: formatNumber(strokes), limit: fatigue && strokes >= FATIGUE_CYCLES ? `reserve ${formatNumber(fatigue.safetyFactor, 2)}` : '' },
    { name: 'Material', symbol: '', value: `${design.materialName}${tensileStrengthMpa === null ? '' : `, Rm ${formatStress(tensileStrengthMpa, units)}`}`, limit: '', isWide: true },
  ]
}

const indexed = (symbol: string, count: number) => Array.from({ length: count }, (_, at) => `${symbol}${at + 1}`).join(', ')
const loadName = (count: number, at: number, place: string, word = 'load') => count > 1 ? `${ORDINALS[at] ?? `No. ${at + 1}`} ${word}, at ${place}` : `${word === 'load' ? 'Load' : 'Moment'}, at ${place}`
const allowed = (limit: number | null, { stress }: Pens) => limit === null ? '' : `${stress(limit)} allowed`

function compressionRows(design: StoredDesignOf<'compression'>, units: UnitSystem, duty: Duty, pen: Pens): QuoteRow[] {
  const { evaluation } = design
  const { points } = evaluation
  const squareness = evaluation.tolerances.find(one => one.quantity === 'squarenessMm')
  const parallelism = evaluation.tolerances.find(one => one.quantity === 'parallelismMm')
  const [cycles, material] = dutyRows(design, units, duty)
  const { strokesPerMinute } = duty
  return [
    ...wireRows(design, units, pen),
    { name: 'Active, total coils', symbol: 'n, n_t', value: `${coils(design.activeCoils)}, ${coils(design.totalCoils)}`, limit: '' },
    { name: 'Free length', symbol: 'L_0', value: pen.length(design.freeLengthMm), limit: points.length > 1 ? 'for information' : pen.plusMinus('freeLengthMm', pen.fine) },
    ...points.map((point, at): QuoteRow => ({
      name: loadName(points.length, at, formatLength(point.lengthMm, units)), symbol: `F_${at + 1}`, value: formatForce(point.forceN, units), limit: pen.plusMinus(`force${at + 1}N`, force => formatForce(force, units)),
    })),
    { name: 'Least working length', symbol: 'L_n', value: pen.length(evaluation.shortestLengthMm), limit: '' },
    { name: 'Solid length', symbol: 'L_c', value: pen.length(evaluation.solidLengthMm), limit: 'at most' },
    { name: 'Rate', symbol: 'R', value: formatRate(evaluation.rateNPerMm, units), limit: '' },
    ...(points.length > 0
      ? [
          { name: points.length > 1 ? 'Stress at the loads' : 'Stress at the load', symbol: indexed('τ_', points.length), value: pen.stresses(points.map(point => point.stressMpa)), limit: '' },
          { name: 'the same, corrected', symbol: indexed('τ_k', points.length), value: pen.stresses(points.map(point => point.correctedStressMpa)), limit: `k = ${formatNumber(evaluation.stressCorrectionFactor, 3)}` },
        ]
      : []),
    { name: 'Stress when solid', symbol: 'τ_c', value: pen.stresses([evaluation.solid.stressMpa]), limit: allowed(evaluation.allowableStressMpa, pen) },
    ...(squareness && parallelism ? [{ name: 'Squareness, parallelism', symbol: 'e_1, e_2', value: `${pen.fine(squareness.plusMinus)}, ${pen.fine(parallelism.plusMinus)}`, limit: 'at most' }] : []),
    cycles!,
    { name: 'Own frequency', symbol: 'f_e', value: `${formatNumber(evaluation.naturalFrequencyHz)}${THIN_SPACE}Hz`, limit: strokesPerMinute > 0 ? `works at ${formatNumber(strokesPerMinute / 60, strokesPerMinute < 60 ? 2 : 0)}${THIN_SPACE}Hz` : '' },
    material!,
    { name: 'Ends, hand', symbol: '', value: `${ENDS_WORDS[design.spring.ends ?? 'closed-ground'].toLowerCase()}, ${design.hand}-hand`, limit: '', isWide: true },
  ]
}

function extensionRows(design: StoredDesignOf<'extension'>, units: UnitSystem, duty: Duty, pen: Pens): QuoteRow[] {
  const { evaluation } = design
  const { points } = evaluation
  const hookRow = (name: string, symbol: string, stress: number | null, limit: number | null): QuoteRow[] => stress === null ? [] : [{ name, symbol, value: pen.stresses([stress]), limit: allowed(limit, pen) }]
  return [
    ...wireRows(design, units, pen),
    { name: 'Coils in the body, active', symbol: 'n_b, n', value: `${coils(design.totalCoils)}, ${coils(design.activeCoils)}`, limit: '' },
    { name: 'Free length inside the hooks', symbol: 'L_0', value: pen.length(design.freeLengthMm), limit: pen.plusMinus('insideHooksFreeLengthMm', pen.fine) },
    { name: 'Length of the body', symbol: 'L_K', value: pen.length(evaluation.bodyLengthMm), limit: '' },
    { name: 'Initial tension', symbol: 'F_0', value: formatForce(evaluation.initialTensionN, units), limit: '' },
    ...points.map((point, at): QuoteRow => ({ name: loadName(points.length, at, formatLength(point.lengthMm, units)), symbol: `F_${at + 1}`, value: formatForce(point.forceN, units), limit: 'for agreement' })),
    ...(evaluation.greatestLengthMm === null || evaluation.greatestForceN === null ? [] : [{ name: 'Never pull beyond', symbol: 'L_n', value: pen.length(atMost(evaluation.greatestLengthMm)), limit: formatForce(evaluation.greatestForceN, units) }]),
    { name: 'Rate', symbol: 'R', value: formatRate(evaluation.rateNPerMm, units), limit: '' },
    ...(points.length > 0 ? [{ name: points.length > 1 ? 'Stress at the loads' : 'Stress at the load', symbol: indexed('τ_', points.length), value: pen.stresses(points.map(point => point.stressMpa)), limit: allowed(evaluation.allowableStressMpa, pen) }] : []),
    ...hookRow('Bending in the hooks', 'σ_A', evaluation.hookBendingStressMpa, evaluation.hookBendingLimitMpa),
    ...hookRow('Torsion at the hooks', 'τ_B', evaluation.hookTorsionStressMpa, evaluation.hookTorsionLimitMpa),
    ...dutyRows(design, units, duty),
    { name: 'Hooks, hand', symbol: '', value: `${HOOK_CHOICES[design.spring.hook?.form ?? 'full-loop'].toLowerCase()}, ${design.hand}-hand`, limit: '', isWide: true },
  ]
}

function torsionRows(design: StoredDesignOf<'torsion'>, units: UnitSystem, duty: Duty, pen: Pens): QuoteRow[] {
  const { evaluation } = design
  const { points } = evaluation
  const legs = design.spring.legs ?? []
  return [
    ...wireRows(design, units, pen),
    { name: 'Coils in the body, active', symbol: 'n_b, n', value: `${coils(design.totalCoils)}, ${coils(design.activeCoils)}`, limit: '' },
    { name: 'Length of the body', symbol: 'L_K', value: pen.length(evaluation.bodyLengthMm), limit: '' },
    ...(legs.length > 0 ? [{ name: 'Legs', symbol: 'l_1, l_2', value: legs.map(leg => pen.length(leg.lengthMm)).join(', '), limit: 'for agreement' }] : []),
    ...points.map((point, at): QuoteRow => ({
      name: loadName(points.length, at, `${formatAngle(point.angleDeg)} from free`, 'moment'), symbol: `M_${at + 1}`, value: formatMoment(point.momentNmm, units), limit: pen.plusMinus(`moment${at + 1}Nmm`, moment => formatMoment(moment, units)),
    })),
    ...(evaluation.greatestAngleDeg === null || evaluation.greatestMomentNmm === null ? [] : [{ name: 'Never turn beyond', symbol: 'α_n', value: formatAngle(atMost(evaluation.greatestAngleDeg)), limit: formatMoment(evaluation.greatestMomentNmm, units) }]),
    { name: 'Rate', symbol: 'R', value: formatMomentRate(evaluation.rateNmmPerDeg, units).replace('/', `/${WORD_JOINER}`), limit: '' },
    ...(points.length > 0
      ? [
          { name: 'Bending stress', symbol: indexed('σ_', points.length), value: pen.stresses(points.map(point => point.bendingStressMpa)), limit: allowed(evaluation.allowableStressMpa, pen) },
          { name: 'Inside when turned', symbol: 'D_i', value: points.map(point => pen.fine(point.innerDiameterAtPointMm)).join(', '), limit: `usual rod ${pen.length(atMost(evaluation.recommendedRodMm))}` },
        ]
      : []),
    ...dutyRows(design, units, duty),
    { name: 'Legs, hand', symbol: '', value: `${legs[0] ? LEG_CHOICES[legs[0].form].toLowerCase() : 'none'}, ${design.hand}-hand`, limit: '', isWide: true },
  ]
}

/** Everything that is made and promised, as EN ISO 26909 and EN 13906 name it. Lengths carry no unit: the sheet says it once. */
export function quoteRows(design: StoredDesign, { units, strokes, strokesPerMinute }: { units: UnitSystem } & Duty): QuoteRow[] {
  const pen = pens(design, units)
  const duty = { strokes, strokesPerMinute }
  switch (design.kind) {
    case 'compression': return compressionRows(design, units, duty, pen)
    case 'extension': return extensionRows(design, units, duty, pen)
    case 'torsion': return torsionRows(design, units, duty, pen)
  }
}
