import { wireDiameterToleranceMm } from '../materials/wire-tolerance'
import type { Origin, SourcedValue, SteppedModulus } from '../materials/types'
import type { SpringEvaluation, SpringInput } from '../mechanics/spring'
import { buildWireModel, type WireModel } from '../mechanics/wire-model'
import type { SheetGroup, SheetQuantity, SheetRow } from './types'
import { HANDS, METHODS } from './words'

export const GIVEN = 'given'
export const NOT_STATED = 'not stated'

/** A row for what was typed; null shows as not stated. */
export const given = (field: string, symbol: string, name: string, value: number | string | undefined, quantity: SheetQuantity, words?: string): SheetRow =>
  ({ field, symbol, name, value: value ?? NOT_STATED, quantity, formula: '', basis: value === undefined ? '' : GIVEN, ...(words ? { words } : {}) })

/** A row for what was worked out. */
export const computed = (
  field: string, symbol: string, name: string, value: number | null, quantity: SheetQuantity, formula: string, basis: string, words?: string,
): SheetRow => ({ field, symbol, name, value, quantity, formula, basis, ...(words ? { words } : {}) })

/** A choice with the default that holds where nothing was chosen. */
export const chosen = (field: string, name: string, value: string | undefined, otherwise: string, words?: string): SheetRow =>
  ({ field, symbol: '', name, value: value ?? otherwise, quantity: 'coils', formula: '', basis: value === undefined ? 'taken where nothing is stated' : GIVEN, ...(words ? { words } : {}) })

export const yesNo = (value: boolean | undefined): string | undefined => (value === undefined ? undefined : value ? 'yes' : 'no')

const DEFINITION = 'definition, EN ISO 26909'

export const wireModelOf = (spring: SpringInput): WireModel => buildWireModel(spring, spring)

export const wireRow = (spring: SpringInput): SheetRow => given('wireDiameterMm', 'd', 'Wire diameter', spring.wireDiameterMm, 'wire')

/** Diameters and index. */
export function diameterRows(spring: SpringInput, evaluation: SpringEvaluation): SheetRow[] {
  return [
    given('meanDiameterMm', 'D', 'Mean diameter', spring.meanDiameterMm, 'length', 'Of the coil, from the middle of the wire to the middle of the wire.'),
    computed('outerDiameterMm', 'D_e', 'Outside diameter', evaluation.outerDiameterMm, 'length', 'D_e = D + d', DEFINITION),
    computed('innerDiameterMm', 'D_i', 'Inside diameter', evaluation.innerDiameterMm, 'length', 'D_i = D − d', DEFINITION),
    computed('springIndex', 'w', 'Spring index', evaluation.springIndex, 'ratio', 'w = D/d', DEFINITION, 'How tightly the wire is coiled: small is hard to coil, large tangles.'),
  ]
}

export const handRow = (spring: SpringInput): SheetRow =>
  chosen('hand', 'Direction of coiling', spring.hand ? HANDS[spring.hand] : undefined, spring.kind === 'torsion' ? 'either' : 'right', 'Right: it rises like the thread of a common screw.')

export const massRow = (evaluation: SpringEvaluation): SheetRow =>
  computed('massG', 'm', 'Mass', evaluation.massG, 'mass', 'm = π/4 d^2 l ρ', 'geometry, nominal wire')

export const wireLengthRow = (evaluation: SpringEvaluation, formula: string, basis: string): SheetRow =>
  computed('wireLengthMm', 'l', 'Length of wire', evaluation.wireLengthMm, 'length', formula, basis)

/** Where it works and how it is judged: what was typed. */
export function dutyRows(spring: SpringInput): SheetRow[] {
  return [
    chosen('method', 'Method', spring.method ? METHODS[spring.method] : undefined, METHODS.en13906, 'Which published stress factor and which limits are used.'),
    given('duty.cycles', 'N', 'Strokes in its life', spring.duty?.cycles, 'cycles'),
    given('duty.strokesPerMinute', '', 'Strokes per minute', spring.duty?.strokesPerMinute, 'perMinute'),
    given('temperatureC', '', 'Working temperature', spring.temperatureC, 'temperature'),
    given('fit.boreMm', '', 'Works in a bore of', spring.fit?.boreMm, 'length'),
    given('fit.rodMm', '', 'Works over a rod of', spring.fit?.rodMm, 'length'),
    given('fit.maxFreeLengthMm', '', 'Longest free length that fits', spring.fit?.maxFreeLengthMm, 'length'),
    given('fit.maxSolidLengthMm', '', 'Longest solid or closed length that fits', spring.fit?.maxSolidLengthMm, 'length'),
  ]
}

const origin = ({ origin, source }: { origin: Origin, source: string }): string =>
  (origin === 'published' || /from memory|computed/.test(source) ? source : `${source} (${origin})`)

function materialRow(field: string, symbol: string, name: string, value: number | null, quantity: SheetQuantity, ownValue: number | undefined, from: SourcedValue | SteppedModulus | { origin: Origin, source: string }): SheetRow {
  return { field, symbol, name, value, quantity, formula: '', basis: ownValue === undefined ? origin(from) : `${GIVEN}, in place of the table's value` }
}

/** The material with every value used and its source; and how the wire is treated. */
export function materialGroup(spring: SpringInput, evaluation: SpringEvaluation): SheetGroup {
  const model = wireModelOf(spring)
  const { material } = model
  const own = spring.materialValues ?? {}
  return {
    title: 'Material and treatment',
    rows: [
      { field: 'material', symbol: '', name: 'Material', value: `${material.name}, ${material.code}`, quantity: 'coils', formula: '', basis: `given; ${material.standard}` },
      materialRow('tensileStrengthMpa', 'R_m', 'Least tensile strength', evaluation.tensileStrengthMpa, 'stress', own.tensileStrengthMpa, material.strength),
      materialRow('materialValues.shearModulusMpa', 'G', 'Shear modulus at 20 °C', model.shearModulusMpa, 'stress', own.shearModulusMpa, material.shearModulus),
      materialRow('materialValues.youngsModulusMpa', 'E', 'Young’s modulus at 20 °C', model.youngsModulusMpa, 'stress', own.youngsModulusMpa, material.youngsModulus),
      materialRow('materialValues.densityKgPerM3', 'ρ', 'Density', model.densityKgPerM3, 'density', own.densityKgPerM3, material.densityKgPerM3),
      materialRow('material.modulusLossPerKelvin', '', 'Loss of G and E with heat', material.modulusLossPerKelvin.value, 'perKelvin', undefined, material.modulusLossPerKelvin),
      materialRow('material.temperatureLimitC', '', 'Greatest temperature', material.temperatureLimitC.value, 'temperature', undefined, material.temperatureLimitC),
      {
        field: 'material.wireTolerance', symbol: '', name: 'Tolerance of the wire, ±', value: wireDiameterToleranceMm(spring.wireDiameterMm), quantity: 'fineLength',
        formula: spring.wireDiameterMm > 0.5 ? '±0.015 sqrt(d)' : '', basis: spring.wireDiameterMm > 0.5 ? 'EN 10218-2 class T4, coefficient from memory' : 'suppliers’ tables of EN 10270-1 and ISO 8458-2',
      },
      {
        field: 'material.stressRelief', symbol: '', name: 'Stress relief', value: material.stressRelief.temperatureC, quantity: 'temperature',
        formula: `for ${material.stressRelief.minutes} minutes`, basis: origin(material.stressRelief), words: 'Heat after coiling, which takes out the stress that coiling left.',
      },
      { field: 'material.corrosion', symbol: '', name: 'Corrosion', value: material.corrosionNote, quantity: 'coils', formula: '', basis: material.standard },
      chosen('shotPeened', 'Shot peened', yesNo(spring.shotPeened), 'no', 'Small shot thrown at the surface: it lasts longer under changing load.'),
      chosen('preset', 'Preset', yesNo(spring.preset), 'no', 'Pressed solid once at the maker’s, so that it does not settle later.'),
      chosen('toleranceGrade', 'Tolerance grade, EN 15800', spring.toleranceGrade?.toString(), '2', '1 is fine, 2 usual, 3 coarse.'),
    ],
  }
}

/** Fatigue between the least and the greatest working load; the evaluation gives none without a life and two loads. */
export function fatigueRows({ fatigue }: SpringEvaluation, stress: { readonly symbol: string, readonly basis: string }): SheetRow[] {
  if (!fatigue) return []
  const { symbol, basis } = stress
  return [
    { field: 'fatigue.method', symbol: '', name: 'Fatigue by', value: fatigue.method, quantity: 'coils', formula: '', basis },
    computed('fatigue.life', 'N', 'Strokes asked for', fatigue.life, 'cycles', '', GIVEN),
    computed('fatigue.meanStressMpa', `${symbol}_m`, 'Mean stress, corrected', fatigue.meanStressMpa, 'stress', `${symbol}_m = (${symbol}_max + ${symbol}_min)/2`, 'definition'),
    computed('fatigue.amplitudeMpa', `${symbol}_a`, 'Stress amplitude, corrected', fatigue.amplitudeMpa, 'stress', `${symbol}_a = (${symbol}_max − ${symbol}_min)/2`, 'definition'),
    computed('fatigue.allowableAmplitudeMpa', '', 'Allowable amplitude', fatigue.allowableAmplitudeMpa, 'stress', `S ${symbol}_a`, 'on the load line of the two stresses'),
    computed('fatigue.safetyFactor', 'S', 'Safety factor, unlimited life', fatigue.safetyFactor, 'ratio', `1/S = ${symbol}_a/S_e + ${symbol}_m/S_u`, basis, 'Over 1: it should last. Under 1: it may break within its life.'),
    computed('fatigue.lifeFractionSafetyFactor', '', 'Safety factor at the life asked for', fatigue.lifeFractionSafetyFactor, 'ratio', '', 'published fractions of tensile strength by life, from memory; none outside their range'),
  ]
}
