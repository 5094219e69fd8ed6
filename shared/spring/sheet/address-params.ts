import type { Quantity, UnitSystem } from '../../units/convert'
import {
  COIL_HANDS, COMPRESSION_ENDS, HOOK_FORMS, LEG_FORMS, MATERIAL_CODES, SEATING_COEFFICIENTS, STRESS_METHODS, TOLERANCE_GRADES, type SpringKind,
} from '../codes'

/** What a parameter of a spring's address holds. A count has no unit; a flag is yes or no; a point names its quantity by its first letter. */
export type ParamForm =
  | { readonly is: 'quantity', readonly quantity: Quantity }
  | { readonly is: 'count' }
  | { readonly is: 'choice', readonly values: readonly (string | number)[] }
  | { readonly is: 'flag', readonly yes: string, readonly no: string }
  | { readonly is: 'point' }

export interface AddressParam {
  readonly name: string
  /** Where the value stands in the request that evaluates, by kind; a kind that is absent does not know the parameter. */
  readonly paths: Partial<Readonly<Record<SpringKind, string>>>
  readonly form: ParamForm
}

const every = (path: string) => ({ compression: path, extension: path, torsion: path })
const quantity = (of: Quantity): ParamForm => ({ is: 'quantity', quantity: of })
const choice = (values: readonly (string | number)[]): ParamForm => ({ is: 'choice', values })
const count: ParamForm = { is: 'count' }
const flag: ParamForm = { is: 'flag', yes: 'yes', no: 'no' }

export const MOST_POINTS = 6

/** Every parameter of a spring's address but its kind, in the order in which an address is written. */
export const ADDRESS_PARAMS: readonly AddressParam[] = [
  { name: 'material', paths: every('material'), form: choice(MATERIAL_CODES) },
  { name: 'd', paths: every('wireDiameterMm'), form: quantity('length') },
  { name: 'D', paths: every('meanDiameterMm'), form: quantity('length') },
  { name: 'n', paths: every('activeCoils'), form: count },
  { name: 'nt', paths: { compression: 'totalCoils' }, form: count },
  { name: 'nb', paths: { extension: 'bodyCoils', torsion: 'bodyCoils' }, form: count },
  { name: 'L0', paths: { compression: 'freeLengthMm', extension: 'insideHooksFreeLengthMm' }, form: quantity('length') },
  { name: 'F0', paths: { extension: 'initialTensionN' }, form: quantity('force') },
  { name: 'ends', paths: { compression: 'ends' }, form: choice(COMPRESSION_ENDS) },
  { name: 'hook', paths: { extension: 'hook.form' }, form: choice(HOOK_FORMS) },
  { name: 'r1', paths: { extension: 'hook.bendRadiusMm' }, form: quantity('length') },
  { name: 'r2', paths: { extension: 'hook.sideBendRadiusMm' }, form: quantity('length') },
  { name: 'leg1', paths: { torsion: 'legs.0.lengthMm' }, form: quantity('length') },
  { name: 'leg1form', paths: { torsion: 'legs.0.form' }, form: choice(LEG_FORMS) },
  { name: 'leg2', paths: { torsion: 'legs.1.lengthMm' }, form: quantity('length') },
  { name: 'leg2form', paths: { torsion: 'legs.1.form' }, form: choice(LEG_FORMS) },
  ...Array.from({ length: MOST_POINTS }, (_, i): AddressParam => ({ name: `p${i + 1}`, paths: every(`points.${i}`), form: { is: 'point' } })),
  { name: 'hand', paths: every('hand'), form: choice(COIL_HANDS) },
  { name: 'seat', paths: { compression: 'seatingCoefficient' }, form: choice(SEATING_COEFFICIENTS) },
  { name: 'guided', paths: { compression: 'guided' }, form: flag },
  { name: 'solid', paths: { compression: 'solidSafe' }, form: { is: 'flag', yes: 'safe', no: 'avoided' } },
  { name: 'opens', paths: { torsion: 'loadOpens' }, form: flag },
  { name: 'bore', paths: every('fit.boreMm'), form: quantity('length') },
  { name: 'rod', paths: every('fit.rodMm'), form: quantity('length') },
  { name: 'mandrel', paths: { torsion: 'mandrelMm' }, form: quantity('length') },
  { name: 'maxL0', paths: every('fit.maxFreeLengthMm'), form: quantity('length') },
  { name: 'maxLc', paths: every('fit.maxSolidLengthMm'), form: quantity('length') },
  { name: 'method', paths: every('method'), form: choice(STRESS_METHODS) },
  { name: 'cycles', paths: every('duty.cycles'), form: count },
  { name: 'strokes', paths: every('duty.strokesPerMinute'), form: count },
  { name: 'temperature', paths: every('temperatureC'), form: quantity('temperature') },
  { name: 'peened', paths: every('shotPeened'), form: flag },
  { name: 'preset', paths: every('preset'), form: flag },
  { name: 'grade', paths: every('toleranceGrade'), form: choice(TOLERANCE_GRADES) },
  { name: 'Rm', paths: every('materialValues.tensileStrengthMpa'), form: quantity('stress') },
  { name: 'G', paths: every('materialValues.shearModulusMpa'), form: quantity('stress') },
  { name: 'E', paths: every('materialValues.youngsModulusMpa'), form: quantity('stress') },
  { name: 'rho', paths: every('materialValues.densityKgPerM3'), form: count },
]

/** The parameters that a kind knows. */
export const paramsOf = (kind: SpringKind): readonly AddressParam[] => ADDRESS_PARAMS.filter(param => param.paths[kind] !== undefined)

/** Units as an address writes them: letters that every keyboard and every address has. */
export const ADDRESS_UNITS: Readonly<Record<UnitSystem, Readonly<Record<Quantity, string>>>> = {
  metric: { length: 'mm', force: 'N', rate: 'N/mm', moment: 'Nmm', momentRate: 'Nmm/deg', angle: 'deg', stress: 'MPa', mass: 'g', temperature: 'C' },
  inch: { length: 'in', force: 'lbf', rate: 'lbf/in', moment: 'lbfin', momentRate: 'lbfin/deg', angle: 'deg', stress: 'ksi', mass: 'oz', temperature: 'F' },
}

export interface PointForm {
  readonly letter: string
  readonly field: 'lengthMm' | 'forceN' | 'deflectionMm' | 'angleDeg' | 'momentNmm'
  readonly quantity: Quantity
}

const LOAD_POINTS: readonly PointForm[] = [
  { letter: 'L', field: 'lengthMm', quantity: 'length' }, { letter: 'F', field: 'forceN', quantity: 'force' }, { letter: 's', field: 'deflectionMm', quantity: 'length' },
]
const TURN_POINTS: readonly PointForm[] = [{ letter: 'a', field: 'angleDeg', quantity: 'angle' }, { letter: 'M', field: 'momentNmm', quantity: 'moment' }]

/** In what a working point of a kind can be given; the first is the usual one. */
export const pointFormsOf = (kind: SpringKind): readonly PointForm[] => (kind === 'torsion' ? TURN_POINTS : LOAD_POINTS)
