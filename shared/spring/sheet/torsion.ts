import { torsionLimit } from '../mechanics/static-limits'
import { innerFibreFactor } from '../mechanics/torsion/bending'
import { OPENING_SHARE } from '../mechanics/torsion/model'
import type { TorsionEvaluation, TorsionInput } from '../mechanics/torsion/types'
import { chosen, computed, diameterRows, dutyRows, fatigueRows, given, GIVEN, handRow, massRow, materialGroup, wireLengthRow, wireModelOf, wireRow, yesNo } from './common'
import type { SheetColumn, SheetGroup, SheetPoints, SheetRow } from './types'
import { LEGS } from './words'

const EN = 'EN 13906-3'
const SHIGLEY = 'Shigley'

/** Factor of the stress correction in bending, as its method writes it. */
const bendingFactor = (isWahl: boolean) => (isWahl
  ? { formula: 'q = (4w^2 − w − 1)/(4w (w − 1))', basis: 'inner fibre (Bhandari ch. 10; Shigley)' }
  : { formula: 'q = (w + 0.07)/(w − 0.75)', basis: 'EN 13906-3, from memory' })

function legRows({ legs = [] }: TorsionInput): SheetRow[] {
  if (legs.length === 0) return [{ field: 'legs', symbol: '', name: 'Legs', value: 'none: the body alone', quantity: 'coils', formula: '', basis: 'taken where nothing is stated' }]
  return legs.flatMap((leg, i) => [
    given(`legs.${i}.lengthMm`, `l_${i + 1}`, `Leg ${i + 1}, from the body to the load`, leg.lengthMm, 'length'),
    { field: `legs.${i}.form`, symbol: '', name: `Form of leg ${i + 1}`, value: LEGS[leg.form], quantity: 'coils', formula: '', basis: GIVEN } as const,
  ])
}

/** The data of a torsion spring. */
export function torsionGroups(spring: TorsionInput, evaluation: TorsionEvaluation): SheetGroup[] {
  const isWahl = spring.method === 'wahl'
  const model = wireModelOf(spring)
  const factor = bendingFactor(isWahl)
  const limit = torsionLimit(model.method, model.material.family, innerFibreFactor)
  const rate = isWahl ? { formula: 'R = E d^4/(3888 D n)', basis: `${SHIGLEY}; counts friction between the coils` } : { formula: 'R = E d^4/(3667 D n)', basis: EN }
  const share = spring.loadOpens ? `${OPENING_SHARE} · ` : ''
  return [
    {
      title: 'Wire and coil',
      rows: [
        wireRow(spring),
        ...diameterRows(spring, evaluation),
        computed('bodyCoils', 'n_b', 'Coils in the body', evaluation.bodyCoils, 'coils', spring.bodyCoils === undefined ? 'n_b = n − n_l' : '', spring.bodyCoils === undefined ? SHIGLEY : GIVEN),
        computed('legCoils', 'n_l', 'Coils that the legs work like', evaluation.legCoils, 'coils', spring.activeCoils === undefined || spring.bodyCoils === undefined ? 'n_l = (l_1 + l_2)/(3 π D)' : 'n_l = n − n_b', `${SHIGLEY} ch. 10`),
        computed('activeCoils', 'n', 'Active coils', evaluation.activeCoils, 'coils', spring.activeCoils === undefined ? 'n = n_b + n_l' : '', spring.activeCoils === undefined ? SHIGLEY : GIVEN),
        computed('bodyLengthMm', 'L_K', 'Length of the body, free', evaluation.bodyLengthMm, 'length', 'L_K = (n_b + 1) d', 'closed coils, from memory'),
        ...legRows(spring),
        handRow(spring),
        wireLengthRow(evaluation, 'l = π D n_b + l_1 + l_2', 'geometry'),
        massRow(evaluation),
      ],
    },
    {
      title: 'Moments, angles and rate',
      rows: [
        computed('rateNmmPerDeg', 'R', 'Rate for each degree', evaluation.rateNmmPerDeg, 'momentRate', rate.formula, rate.basis, 'The moment for each degree that it is turned.'),
        computed('rateNmmPerTurn', '', 'Rate for each turn', evaluation.rateNmmPerTurn, 'moment', '360 R', 'definition'),
        ...evaluation.rateAtTemperatureNmmPerDeg === null ? [] : [
          computed('rateAtTemperatureNmmPerDeg', 'R_t', 'Rate at the working temperature', evaluation.rateAtTemperatureNmmPerDeg, 'momentRate', 'R with E_t = E (1 − r (t − 20 °C))', 'EN 13906-1, from memory'),
        ],
        computed('greatestMomentNmm', 'M_n', 'Greatest moment allowed', evaluation.greatestMomentNmm, 'moment', isWahl ? 'M_n = σ_zul π d^3/(32 q)' : 'M_n = σ_zul π d^3/32', isWahl ? SHIGLEY : EN),
        computed('greatestAngleDeg', 'α_n', 'Angle at the greatest moment', evaluation.greatestAngleDeg, 'angle', 'α_n = M_n/R', EN),
        computed('legDeflectionDeg', '', 'Share of the legs in the greatest angle', evaluation.legDeflectionDeg, 'angle', 'α (1 − n_b/n)', `${SHIGLEY} ch. 10`),
        computed('recommendedRodMm', '', 'Greatest rod it should work on', evaluation.recommendedRodMm, 'length', '0.9 times the least inside diameter as it works', 'widely used, from memory'),
        given('mandrelMm', '', 'Works on a mandrel of', spring.mandrelMm, 'length'),
        chosen('loadOpens', 'The load opens the coil', yesNo(spring.loadOpens), 'no, it winds it up'),
      ],
    },
    {
      title: 'Stress',
      rows: [
        computed('stressCorrectionFactor', 'q', 'Stress correction factor', evaluation.stressCorrectionFactor, 'ratio', factor.formula, factor.basis, 'The wire is bent, so its inner side bears more.'),
        computed('allowableStressMpa', 'σ_zul', 'Allowable bending stress', evaluation.allowableStressMpa, 'stress', `σ_zul = ${share}${limit.fractionOfStrength} R_m`, spring.loadOpens ? `${limit.basis}; a fifth less as the load opens the coil (a stockist’s public page)` : limit.basis),
        ...fatigueRows(evaluation, { symbol: 'σ', basis: 'Goodman in bending, S_u = R_m, S_e from Zimmerli’s point over 0.577 (Shigley, for hooks)' }),
      ],
    },
    { title: 'Where and how it works', rows: dutyRows(spring) },
    materialGroup(spring, evaluation),
  ]
}

const column = (field: string, symbol: string, name: string, quantity: SheetColumn['quantity'], formula: string, basis: string): SheetColumn => ({ field, symbol, name, quantity, formula, basis })

/** The working points of a torsion spring. */
export function torsionPoints(spring: TorsionInput, evaluation: TorsionEvaluation): SheetPoints {
  const factor = bendingFactor(spring.method === 'wahl')
  return {
    columns: [
      column('angleDeg', 'α', 'Angle from free', 'angle', 'α = M/R', GIVEN + ' or computed'),
      column('momentNmm', 'M', 'Moment', 'moment', 'M = R α', EN),
      column('bendingStressMpa', 'σ', 'Bending stress', 'stress', 'σ = 32 M/(π d^3)', EN),
      column('correctedStressMpa', 'σ_q', 'Stress, corrected', 'stress', 'σ_q = q σ', factor.basis),
      column('utilisation', '', 'Share of the allowable', 'share', 'compared stress/σ_zul', 'the stress its method compares'),
      column('innerDiameterAtPointMm', 'D_i', 'Inside diameter there', 'length', 'D n_b/(n_b + turns of the body) − d', `${SHIGLEY} ch. 10`),
      column('bodyLengthMm', 'L_K', 'Length of the body there', 'length', 'd (n_b + 1 + turns of the body)', 'from memory'),
    ],
    rows: evaluation.points.map(point => [
      point.angleDeg, point.momentNmm, point.bendingStressMpa, point.correctedStressMpa, point.utilisation, point.innerDiameterAtPointMm, point.bodyLengthMm,
    ]),
  }
}
