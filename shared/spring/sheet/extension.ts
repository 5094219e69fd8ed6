import type { HookForm } from '../codes'
import type { ExtensionEvaluation, ExtensionInput } from '../mechanics/extension/types'
import { extensionBodyLimit, hookLimits } from '../mechanics/static-limits'
import { chosen, computed, diameterRows, dutyRows, fatigueRows, given, GIVEN, handRow, massRow, materialGroup, wireLengthRow, wireModelOf, wireRow } from './common'
import { shearFactor } from './compression'
import type { SheetColumn, SheetGroup, SheetPoints } from './types'
import { HOOKS } from './words'

const EN = 'EN 13906-2'
const SHIGLEY = 'Shigley'
const PRACTICE = 'common practice, no source'

const FREE_LENGTH: Readonly<Record<HookForm, readonly [formula: string, basis: string]>> = {
  'full-loop': ['L_0 = 2 (D − d) + (n_b + 1) d', SHIGLEY], 'half-loop': ['L_0 = (D − d) + (n_b + 1) d', PRACTICE],
  'crossover-loop': ['L_0 = 2 (D − d) + (n_b + 1) d', PRACTICE], 'extended-hook': ['L_0 = 4 (D − d) + (n_b + 1) d', PRACTICE],
}
const HOOK_WIRE: Readonly<Record<HookForm, string>> = { 'full-loop': 'π D', 'half-loop': 'π D/2', 'crossover-loop': '(π D + D/2)', 'extended-hook': '(π D + shank)' }

/** The data of an extension spring. */
export function extensionGroups(spring: ExtensionInput, evaluation: ExtensionEvaluation): SheetGroup[] {
  const form = spring.hook?.form ?? 'full-loop'
  const model = wireModelOf(spring)
  const factor = shearFactor(spring.method === 'wahl')
  const limit = extensionBodyLimit(model.method, model.material.family)
  const hooks = hookLimits(model.material.family)
  const [freeFormula, freeBasis] = FREE_LENGTH[form]
  const [leastInitial, mostInitial] = evaluation.initialStressRangeMpa
  return [
    {
      title: 'Wire and coil',
      rows: [
        wireRow(spring),
        ...diameterRows(spring, evaluation),
        computed('bodyCoils', 'n_b', 'Coils in the body', evaluation.bodyCoils, 'coils', spring.bodyCoils === undefined ? 'n_b = n − n_h' : '', spring.bodyCoils === undefined ? SHIGLEY : GIVEN),
        computed('coilsEquivalent', 'n_h', 'Coils that the hooks work like', evaluation.coilsEquivalent, 'coils', spring.activeCoils === undefined || spring.bodyCoils === undefined ? 'n_h = G/E' : 'n_h = n − n_b', `${SHIGLEY}, full loops; taken for other hooks too`),
        computed('activeCoils', 'n', 'Active coils', evaluation.activeCoils, 'coils', spring.activeCoils === undefined ? 'n = n_b + n_h' : '', spring.activeCoils === undefined ? SHIGLEY : GIVEN),
        computed('bodyLengthMm', 'L_K', 'Length of the closed body', evaluation.bodyLengthMm, 'length', 'L_K = (n_b + 1) d', 'Machinery’s Handbook'),
        handRow(spring),
        wireLengthRow(evaluation, `l = π D n_b + 2 ${HOOK_WIRE[form]}`, form === 'full-loop' ? 'geometry; hooks from memory' : 'geometry; hooks by common practice'),
        massRow(evaluation),
      ],
    },
    {
      title: 'Hooks',
      rows: [
        chosen('hook.form', 'Form of the hooks', spring.hook && HOOKS[spring.hook.form], HOOKS['full-loop']),
        computed('hookLengthMm', 'L_H', 'Body to the inside of a hook', evaluation.hookLengthMm, 'length', 'L_H = (L_0 − L_K)/2', 'definition'),
        computed('hookBendRadiusMm', 'r_1', 'Mean radius of a hook', evaluation.hookBendRadiusMm, 'length', spring.hook?.bendRadiusMm === undefined ? 'r_1 = D/2' : '', spring.hook?.bendRadiusMm === undefined ? `${SHIGLEY}; taken where none is given` : GIVEN),
        computed('hookSideBendRadiusMm', 'r_2', 'Mean radius of the bend into a hook', evaluation.hookSideBendRadiusMm, 'length', spring.hook?.sideBendRadiusMm === undefined ? 'r_2 = D_i/2' : '', spring.hook?.sideBendRadiusMm === undefined ? `${SHIGLEY}, example 10-6; taken where none is given` : GIVEN),
      ],
    },
    {
      title: 'Lengths, loads and rate',
      rows: [
        computed('insideHooksFreeLengthMm', 'L_0', 'Free length inside the hooks', evaluation.insideHooksFreeLengthMm, 'length', spring.insideHooksFreeLengthMm === undefined ? freeFormula : '', spring.insideHooksFreeLengthMm === undefined ? freeBasis : GIVEN),
        given('initialTensionN', 'F_0', 'Initial tension', evaluation.initialTensionN, 'force', 'The load that it takes before the coils begin to part.'),
        computed('rateNPerMm', 'R', 'Rate', evaluation.rateNPerMm, 'rate', 'R = G d^4/(8 D^3 n)', EN, 'The force for each further millimetre or inch.'),
        ...evaluation.rateAtTemperatureNPerMm === null ? [] : [
          computed('rateAtTemperatureNPerMm', 'R_t', 'Rate at the working temperature', evaluation.rateAtTemperatureNPerMm, 'rate', 'R with G_t = G (1 − r (t − 20 °C))', 'EN 13906-1, from memory'),
        ],
        computed('greatestForceN', 'F_n', 'Greatest load allowed', evaluation.greatestForceN, 'force', 'least of body, hook bending, hook torsion at their limits', 'the limits below'),
        computed('greatestLengthMm', 'L_n', 'Length at the greatest load', evaluation.greatestLengthMm, 'length', 'L_n = L_0 + (F_n − F_0)/R', EN),
      ],
    },
    {
      title: 'Stress',
      rows: [
        computed('stressCorrectionFactor', 'k', 'Stress correction factor', evaluation.stressCorrectionFactor, 'ratio', factor.formula, factor.basis, 'The wire is bent, so its inner side bears more.'),
        computed('initialStressMpa', 'τ_0', 'Stress of the initial tension', evaluation.initialStressMpa, 'stress', 'τ_0 = 8 D F_0/(π d^3)', EN),
        computed('initialStressRangeMpa.0', '', 'Least sensible initial stress', leastInitial, 'stress', '231/exp(0.105 w) − 6.9 (4 − (w − 3)/6.5)', `${SHIGLEY}, from memory`),
        computed('initialStressRangeMpa.1', '', 'Greatest sensible initial stress', mostInitial, 'stress', '231/exp(0.105 w) + 6.9 (4 − (w − 3)/6.5)', `${SHIGLEY}, from memory`),
        computed('allowableStressMpa', 'τ_zul', 'Allowable static stress, body', evaluation.allowableStressMpa, 'stress', `τ_zul = ${limit.fractionOfStrength} R_m`, limit.basis),
        computed('hookBendingStressMpa', 'σ_A', 'Bending in the hooks, greatest load', evaluation.hookBendingStressMpa, 'stress', 'σ_A = F ((4C^2 − C − 1)/(4C (C − 1)) · 16 D/(π d^3) + 4/(π d^2)), C = 2 r_1/d', `${SHIGLEY} ch. 10`),
        computed('hookBendingLimitMpa', '', 'Allowable bending in the hooks', evaluation.hookBendingLimitMpa, 'stress', `${hooks.bendingFraction} R_m`, `${hooks.basis}, from memory`),
        computed('hookTorsionStressMpa', 'τ_B', 'Torsion at the hooks, greatest load', evaluation.hookTorsionStressMpa, 'stress', 'τ_B = (4C − 1)/(4C − 4) · 8 D F/(π d^3), C = 2 r_2/d', `${SHIGLEY} ch. 10`),
        computed('hookTorsionLimitMpa', '', 'Allowable torsion at the hooks', evaluation.hookTorsionLimitMpa, 'stress', `${hooks.torsionFraction} R_m`, `${hooks.basis}, from memory`),
        ...fatigueRows(evaluation, { symbol: 'τ', basis: 'Goodman at the weakest place; S_e through Zimmerli’s point, in bending over 0.577 (Shigley)' }),
      ],
    },
    { title: 'Where and how it works', rows: dutyRows(spring) },
    materialGroup(spring, evaluation),
  ]
}

const column = (field: string, symbol: string, name: string, quantity: SheetColumn['quantity'], formula: string, basis: string): SheetColumn => ({ field, symbol, name, quantity, formula, basis })

/** The working points of an extension spring. */
export function extensionPoints(spring: ExtensionInput, evaluation: ExtensionEvaluation): SheetPoints {
  const factor = shearFactor(spring.method === 'wahl')
  return {
    columns: [
      column('lengthMm', 'L', 'Length inside the hooks', 'length', 'L = L_0 + s', GIVEN + ' or computed'),
      column('deflectionMm', 's', 'Extension', 'length', 's = L − L_0', 'definition'),
      column('forceN', 'F', 'Load', 'force', 'F = F_0 + R s', EN),
      column('stressMpa', 'τ', 'Stress, body', 'stress', 'τ = 8 D F/(π d^3)', EN),
      column('correctedStressMpa', 'τ_k', 'Stress, corrected', 'stress', 'τ_k = k τ', factor.basis),
      column('utilisation', '', 'Share of the allowable, body', 'share', 'compared stress/τ_zul', 'the stress its method compares'),
    ],
    rows: evaluation.points.map(point => [point.lengthMm, point.deflectionMm, point.forceN, point.stressMpa, point.correctedStressMpa, point.utilisation]),
  }
}
