import { COIL_HANDS, COMPRESSION_ENDS, HOOK_FORMS, LEG_FORMS, MATERIAL_CODES, SEATING_COEFFICIENTS, STRESS_METHODS, TOLERANCE_GRADES, type SpringKind } from '#shared/spring/codes'
import { ADDRESS_PARAMS } from '#shared/spring/sheet/address-params'
import { ENDS, HANDS, HOOKS, LEGS, METHODS } from '#shared/spring/sheet/words'
import type { Quantity } from '#shared/units/convert'
import { MATERIAL_WORDS, TOLERANCE_WORDS } from './choice-words'

/** A field of the engineers' page: a parameter of the address with its words. */
export interface SpringsField {
  readonly param: string
  readonly symbol?: string
  readonly label: string
  /** 'What is this?', for people who do not know the term. */
  readonly words?: string
  readonly options?: readonly { readonly value: string, readonly label: string }[]
  /** Words of the choice that leaves the parameter out. */
  readonly otherwise?: string
}

const options = <T extends string | number>(values: readonly T[], words: (value: T) => string) => values.map(value => ({ value: String(value), label: words(value) }))
const YES_NO = [{ value: 'yes', label: 'yes' }, { value: 'no', label: 'no' }] as const
const SEAT_WORDS: Readonly<Record<(typeof SEATING_COEFFICIENTS)[number], string>> = { 0.5: '0.5: both ends on flat seats', 0.707: '0.707: one end free to tilt', 1: '1: both ends free to tilt', 2: '2: one end not held at all' }

const field = (param: string, symbol: string, label: string, words?: string): SpringsField => ({ param, symbol, label, ...(words ? { words } : {}) })
const choice = (param: string, label: string, list: NonNullable<SpringsField['options']>, otherwise: string, words?: string): SpringsField => ({ param, label, options: list, otherwise, ...(words ? { words } : {}) })

const MATERIAL = choice('material', 'Material', options(MATERIAL_CODES, code => MATERIAL_WORDS[code]), 'Choose a material', 'The wire by its standard: strength, stiffness and density follow from it and from its thickness.')
const WIRE = field('d', 'd', 'Wire diameter', 'How thick the wire is.')
const MEAN = field('D', 'D', 'Mean diameter', 'Of the coil, from the middle of the wire to the middle of the wire: outside diameter less one wire.')
const HAND = choice('hand', 'Direction of coiling', options(COIL_HANDS, hand => HANDS[hand]), 'Not stated', 'Right: it rises like the thread of a common screw.')
const BODY = field('nb', 'n_b', 'Coils in the body', 'The coils wound between the ends.')
const ACTIVE = field('n', 'n', 'Active coils', 'The coils that work. Leave empty and they follow from the body.')

/** What describes the spring itself. */
export const SHAPE_FIELDS: Readonly<Record<SpringKind, readonly SpringsField[]>> = {
  compression: [
    MATERIAL, WIRE, MEAN, field('n', 'n', 'Active coils', 'The coils that move; the end coils only seat it.'),
    field('nt', 'n_t', 'Total coils', 'With the end coils. Leave empty and they follow from the ends.'), field('L0', 'L_0', 'Free length', 'Its length without a load.'),
    choice('ends', 'Ends', options(COMPRESSION_ENDS, ends => ENDS[ends]), 'Closed and ground, if not stated', 'Closed: the last coil lies on the one before. Ground: made flat, so that it stands square.'), HAND,
  ],
  extension: [
    MATERIAL, WIRE, MEAN, BODY, ACTIVE, field('F0', 'F_0', 'Initial tension', 'The load that it takes before the coils begin to part.'),
    field('L0', 'L_0', 'Free length inside the hooks', 'Leave empty and it follows from the hooks.'),
    choice('hook', 'Hooks', options(HOOK_FORMS, form => HOOKS[form]), 'Full loops, if not stated', 'How the wire is bent at its two ends to take hold.'),
    field('r1', 'r_1', 'Mean radius of a hook', 'Leave empty for half the mean diameter.'), field('r2', 'r_2', 'Mean radius of the bend into it', 'Where the wire leaves the body. Leave empty for half the inside diameter.'), HAND,
  ],
  torsion: [
    MATERIAL, WIRE, MEAN, BODY, ACTIVE,
    field('leg1', 'l_1', 'First leg', 'From the body to where the load acts. Leave both empty for the body alone.'), choice('leg1form', 'Form of the first leg', options(LEG_FORMS, form => LEGS[form]), 'Tangential, if not stated'),
    field('leg2', 'l_2', 'Second leg'), choice('leg2form', 'Form of the second leg', options(LEG_FORMS, form => LEGS[form]), 'Tangential, if not stated'), HAND,
    choice('opens', 'The load opens the coil', YES_NO, 'No, it winds it up', 'A coil bears more when the load winds it up.'),
  ],
}

const FIT: readonly SpringsField[] = [
  field('bore', '', 'Works in a bore of'), field('rod', '', 'Works over a rod of'), field('maxL0', '', 'Longest free length that fits'), field('maxLc', '', 'Longest solid or closed length that fits'),
]

/** Where it works. */
export const FIT_FIELDS: Readonly<Record<SpringKind, readonly SpringsField[]>> = {
  compression: [
    ...FIT, choice('seat', 'How its ends stand', options(SEATING_COEFFICIENTS, seat => SEAT_WORDS[seat]), '0.5, if not stated', 'A long thin spring bows out sideways; how its ends are held decides when.'),
    choice('guided', 'Guided some other way', YES_NO, 'No, if not stated'),
    choice('solid', 'Pressed solid', [{ value: 'safe', label: 'must bear it' }, { value: 'avoided', label: 'cannot happen' }], 'Must bear it, if not stated', 'Solid: all coils touch.'),
  ],
  extension: FIT,
  torsion: [...FIT, field('mandrel', '', 'Works on a mandrel of', 'The same as the rod: give one of them.')],
}

/** How it is judged and treated. */
export const DUTY_FIELDS: readonly SpringsField[] = [
  choice('method', 'Method', options(STRESS_METHODS, method => METHODS[method]), 'EN 13906, if not stated', 'Which published stress factor and which limits are used.'),
  field('cycles', 'N', 'Strokes in its life', 'From 100 000 on, fatigue is checked.'), field('strokes', '', 'Strokes per minute'), field('temperature', '', 'Working temperature'),
  choice('peened', 'Shot peened', YES_NO, 'No, if not stated', 'Small shot thrown at the surface: it lasts longer under changing load.'),
  choice('preset', 'Preset', YES_NO, 'No, if not stated', 'Pressed once as far as it goes at the maker’s, so that it does not settle later.'),
  choice('grade', 'Tolerance grade', options(TOLERANCE_GRADES, grade => TOLERANCE_WORDS[grade]), 'Grade 2, if not stated'),
]

/** Values in place of the table's. */
export const OWN_FIELDS: readonly SpringsField[] = [
  field('Rm', 'R_m', 'Tensile strength'), field('G', 'G', 'Shear modulus'), field('E', 'E', 'Young’s modulus'), field('rho', 'ρ', 'Density, kg/m³'),
]

/** The quantity of a parameter; null for counts and choices. */
export function quantityOfParam(name: string): Quantity | null {
  const form = ADDRESS_PARAMS.find(param => param.name === name)?.form
  return form?.is === 'quantity' ? form.quantity : null
}

export const springsFieldId = (param: string): string => `spring-${param}`
