import { greatestWireDiameterMm } from '../materials/wire-tolerance'
import type { CompressionEnds } from '../codes'
import type { CompressionEvaluation, CompressionInput } from '../mechanics/compression/types'
import { staticLimit } from '../mechanics/static-limits'
import { chosen, computed, diameterRows, dutyRows, fatigueRows, given, GIVEN, handRow, massRow, materialGroup, wireLengthRow, wireModelOf, wireRow, yesNo } from './common'
import type { SheetColumn, SheetGroup, SheetPoints } from './types'
import { ENDS } from './words'

const EN = 'EN 13906-1'
const MEMORY = 'EN 13906-1, from memory'
const SHIGLEY_ENDS = 'Shigley, Table 10-1'

const PITCH: Readonly<Record<CompressionEnds, string>> = {
  'closed-ground': 'p = (L_0 − (n_t − n) d)/n', 'closed': 'p = (L_0 − (n_t − n + 1) d)/n', 'open': 'p = (L_0 − d)/n', 'open-ground': 'p = L_0/n_t',
}
const TOTAL: Readonly<Record<CompressionEnds, string>> = { 'closed-ground': 'n_t = n + 2', 'closed': 'n_t = n + 2', 'open': 'n_t = n', 'open-ground': 'n_t = n + 1' }
const SOLID_EXTRA = { en: { 'closed-ground': '', 'closed': ' + 1.5', 'open': ' + 1', 'open-ground': '' }, textbook: { 'closed-ground': '', 'closed': ' + 1', 'open': ' + 1', 'open-ground': '' } } as const

/** Factor of the stress correction, as its method writes it. */
export const shearFactor = (isWahl: boolean): { readonly formula: string, readonly basis: string } => (isWahl
  ? { formula: 'k = (4w − 1)/(4w − 4) + 0.615/w', basis: 'Wahl (Shigley ch. 10)' }
  : { formula: 'k = (w + 0.5)/(w − 0.75)', basis: 'EN 13906, from memory (Bergsträsser)' })

function solidLength(ends: CompressionEnds, isWahl: boolean): { readonly formula: string, readonly basis: string } {
  const extra = SOLID_EXTRA[isWahl ? 'textbook' : 'en'][ends]
  const coils = extra ? `(n_t${extra})` : 'n_t'
  if (isWahl) return { formula: `L_c = ${coils} d`, basis: SHIGLEY_ENDS }
  return { formula: `L_c = ${coils} d_max`, basis: ends === 'closed-ground' ? EN : ends === 'closed' ? MEMORY : `${SHIGLEY_ENDS}; open ends are not in EN 13906-1` }
}

/** The data of a compression spring. */
export function compressionGroups(spring: CompressionInput, evaluation: CompressionEvaluation): SheetGroup[] {
  const { solid, buckling } = evaluation
  const ends = spring.ends ?? 'closed-ground'
  const isWahl = spring.method === 'wahl'
  const model = wireModelOf(spring)
  const limit = staticLimit(model.method, model.material.family, model.preset)
  const factor = shearFactor(isWahl)
  const Lc = solidLength(ends, isWahl)
  const growth = ends === 'closed' ? 'm_p = (L_0 − 2.5 d)/n' : 'm_p = (L_0 − d)/n'
  return [
    {
      title: 'Wire and coil',
      rows: [
        wireRow(spring),
        ...isWahl ? [] : [computed('material.greatestWire', 'd_max', 'Greatest wire diameter', greatestWireDiameterMm(spring.wireDiameterMm), 'fineLength', 'd_max = d + tolerance', EN)],
        ...diameterRows(spring, evaluation),
        given('activeCoils', 'n', 'Active coils', spring.activeCoils, 'coils', 'The coils that move; the end coils only seat it.'),
        computed('totalCoils', 'n_t', 'Total coils', evaluation.totalCoils, 'coils', spring.totalCoils === undefined ? TOTAL[ends] : '', spring.totalCoils === undefined ? SHIGLEY_ENDS : GIVEN),
        computed('pitchMm', 'p', 'Pitch, free', evaluation.pitchMm, 'length', PITCH[ends], SHIGLEY_ENDS, 'From one coil to the next.'),
        chosen('ends', 'Form of the ends', spring.ends && ENDS[spring.ends], ENDS['closed-ground']),
        handRow(spring),
        wireLengthRow(evaluation, 'l = n sqrt((π D)^2 + p^2) + (n_t − n) π D', 'geometry of the helix'),
        massRow(evaluation),
      ],
    },
    {
      title: 'Lengths, loads and rate',
      rows: [
        given('freeLengthMm', 'L_0', 'Free length', spring.freeLengthMm, 'length'),
        computed('rateNPerMm', 'R', 'Rate', evaluation.rateNPerMm, 'rate', 'R = G d^4/(8 D^3 n)', EN, 'The force for each millimetre or inch that it is pressed.'),
        ...evaluation.rateAtTemperatureNPerMm === null ? [] : [
          computed('rateAtTemperatureNPerMm', 'R_t', 'Rate at the working temperature', evaluation.rateAtTemperatureNPerMm, 'rate', 'R with G_t = G (1 − r (t − 20 °C))', MEMORY),
        ],
        computed('minimumClearanceMm', 'S_a', 'Least gaps between the coils, in all', evaluation.minimumClearanceMm, 'length', `S_a = ${model.dynamic ? '1.5 ' : ''}n (0.0015 D^2/d + 0.1 d)`, `${MEMORY}; ${model.dynamic ? 'dynamic' : 'static'} duty`),
        computed('shortestLengthMm', 'L_n', 'Least working length', evaluation.shortestLengthMm, 'length', 'L_n = L_c + S_a', EN),
        computed('solidLengthMm', 'L_c', 'Solid length', evaluation.solidLengthMm, 'length', Lc.formula, Lc.basis, 'All coils touch.'),
        computed('solid.forceN', 'F_c', 'Load when solid', solid.forceN, 'force', 'F_c = R (L_0 − L_c)', EN),
      ],
    },
    {
      title: 'Stress',
      rows: [
        computed('stressCorrectionFactor', 'k', 'Stress correction factor', evaluation.stressCorrectionFactor, 'ratio', factor.formula, factor.basis, 'The wire is bent, so its inner side bears more.'),
        computed('solid.stressMpa', 'τ_c', 'Stress when solid', solid.stressMpa, 'stress', 'τ_c = 8 D F_c/(π d^3)', EN),
        computed('solid.correctedStressMpa', 'τ_kc', 'Stress when solid, corrected', solid.correctedStressMpa, 'stress', 'τ_kc = k τ_c', factor.basis),
        computed('allowableStressMpa', 'τ_zul', 'Allowable static stress', evaluation.allowableStressMpa, 'stress', `τ_zul = ${limit.fractionOfStrength} R_m`, limit.basis),
      ],
    },
    {
      title: 'Stability, vibration and life',
      rows: [
        computed('buckling.slenderness', 'λ', 'Slenderness', buckling.slenderness, 'ratio', 'λ = L_0/D', EN),
        { ...chosen('seatingCoefficient', 'Seating coefficient', spring.seatingCoefficient?.toString(), '0.5', 'How the ends stand: 0.5 where both lie on flat seats.'), symbol: 'ν' },
        chosen('guided', 'Guided by other than bore or rod', yesNo(spring.guided), 'no'),
        computed(
          'buckling.criticalDeflectionMm', 's_K', 'Deflection at which it buckles', buckling.criticalDeflectionMm ?? null, 'length',
          's_K = L_0/2 · 1/(1 − G/E) · (1 − sqrt(1 − (1 − G/E)/(0.5 + G/E) · (π D/(ν L_0))^2))', `${MEMORY}; none: it cannot buckle`,
        ),
        { field: 'buckling.ok', symbol: '', name: 'Safe from buckling as it works', value: buckling.ok ? 'yes' : 'no', quantity: 'coils', formula: '', basis: 'its greatest travel against that deflection' },
        computed('naturalFrequencyHz', 'f_e', 'Natural frequency', evaluation.naturalFrequencyHz, 'frequency', 'f_e = d/(2 π n D^2) sqrt(G/(2 ρ))', `${MEMORY}; both ends seated`),
        ...evaluation.impact === null ? [] : [
          computed('impact.speedMPerS', 'v', 'Greatest speed of the moving end', evaluation.impact.speedMPerS, 'speed', 'v = π f s_h', 'moved to and fro evenly (harmonic motion), s_h the stroke'),
          computed('impact.stressMpa', 'τ_v', 'Stress that this speed adds', evaluation.impact.stressMpa, 'stress', 'τ_v = v sqrt(2 ρ G)', MEMORY),
        ],
        computed('outerDiameterAtSolidMm', '', 'Outside diameter when solid', evaluation.outerDiameterAtSolidMm, 'length', `D_e + 0.1 (m_p^2 − 0.8 m_p d − 0.2 d^2)/D, ${growth}`, `${MEMORY}; ends free to turn`),
        ...fatigueRows(evaluation, { symbol: 'τ', basis: 'Goodman, S_u = 0.67 R_m, S_e through Zimmerli’s point (Shigley ch. 10)' }),
      ],
    },
    { title: 'Where and how it works', rows: [...dutyRows(spring), chosen('solidSafe', 'Must bear being pressed solid', yesNo(spring.solidSafe), 'yes')] },
    materialGroup(spring, evaluation),
  ]
}

const column = (field: string, symbol: string, name: string, quantity: SheetColumn['quantity'], formula: string, basis: string): SheetColumn => ({ field, symbol, name, quantity, formula, basis })

/** The working points of a compression spring. */
export function compressionPoints(spring: CompressionInput, evaluation: CompressionEvaluation): SheetPoints {
  const factor = shearFactor(spring.method === 'wahl')
  return {
    columns: [
      column('lengthMm', 'L', 'Length', 'length', 'L = L_0 − s', GIVEN + ' or computed'),
      column('deflectionMm', 's', 'Deflection', 'length', 's = L_0 − L', 'definition'),
      column('forceN', 'F', 'Load', 'force', 'F = R s', EN),
      column('stressMpa', 'τ', 'Stress', 'stress', 'τ = 8 D F/(π d^3)', EN),
      column('correctedStressMpa', 'τ_k', 'Stress, corrected', 'stress', 'τ_k = k τ', factor.basis),
      column('utilisation', '', 'Share of the allowable', 'share', 'compared stress/τ_zul', 'the stress its method compares'),
    ],
    rows: evaluation.points.map(point => [point.lengthMm, point.deflectionMm, point.forceN, point.stressMpa, point.correctedStressMpa, point.utilisation]),
  }
}
