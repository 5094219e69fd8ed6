import type { Quantity } from '#shared/units/convert'

export const QUANTITY_FIELDS = ['quantity1', 'quantity2', 'quantity3', 'quantity4', 'quantity5', 'quantity6'] as const

/** Every field of the order form: its section, what it is called where it is still open, and the physical quantity typed into it. */
export const ORDER_FIELDS = {
  kind: { section: 1, words: 'Which way it works' },
  knows: { section: 1, words: 'What you know' },
  knowsExtension: { section: 1, words: 'What you know' },
  knowsTorsion: { section: 1, words: 'What you know' },
  firstForce: { section: 1, words: 'First load', quantity: 'force' },
  firstLength: { section: 1, words: 'Its length', quantity: 'length' },
  secondForce: { section: 1, words: 'Second load', quantity: 'force' },
  secondLength: { section: 1, words: 'Its length', quantity: 'length' },
  firstMoment: { section: 1, words: 'First moment', quantity: 'moment' },
  firstAngle: { section: 1, words: 'Its angle', quantity: 'angle' },
  secondMoment: { section: 1, words: 'Second moment', quantity: 'moment' },
  secondAngle: { section: 1, words: 'Its angle', quantity: 'angle' },
  rate: { section: 1, words: 'Rate', quantity: 'rate' },
  turnRate: { section: 1, words: 'Rate of turning', quantity: 'momentRate' },
  freeLength: { section: 1, words: 'Free length', quantity: 'length' },
  shortestLength: { section: 1, words: 'Shortest working length', quantity: 'length' },
  firstLeg: { section: 2, words: 'First leg', quantity: 'length' },
  secondLeg: { section: 2, words: 'Second leg', quantity: 'length' },
  legForm: { section: 2, words: 'Legs' },
  load: { section: 2, words: 'Which way it is turned' },
  hook: { section: 2, words: 'Hooks' },
  bore: { section: 2, words: 'Bore', quantity: 'length' },
  rod: { section: 2, words: 'Rod', quantity: 'length' },
  longest: { section: 2, words: 'Longest, unloaded', quantity: 'length' },
  shortestRoom: { section: 2, words: 'Shortest room', quantity: 'length' },
  hand: { section: 2, words: 'Direction of the coils' },
  surroundings: { section: 3, words: 'Surroundings' },
  coldest: { section: 3, words: 'Coldest', quantity: 'temperature' },
  hottest: { section: 3, words: 'Hottest', quantity: 'temperature' },
  strokes: { section: 3, words: 'Strokes' },
  strokesPerMinute: { section: 3, words: 'Strokes a minute' },
  couldHurt: { section: 3, words: 'Could it hurt someone' },
  material: { section: 4, words: 'Material' },
  ends: { section: 4, words: 'Ends' },
  toleranceGrade: { section: 4, words: 'Tolerances' },
  certificate: { section: 4, words: 'Certificate' },
  quantity1: { section: 4, words: 'Quantity' },
  quantity2: { section: 4, words: 'Second quantity' },
  quantity3: { section: 4, words: 'Third quantity' },
  quantity4: { section: 4, words: 'Fourth quantity' },
  quantity5: { section: 4, words: 'Fifth quantity' },
  quantity6: { section: 4, words: 'Sixth quantity' },
  neededOn: { section: 4, words: 'Date' },
  title: { section: 5, words: 'What it is for' },
  name: { section: 5, words: 'Name' },
  firm: { section: 5, words: 'Firm' },
  email: { section: 5, words: 'E-mail' },
  country: { section: 5, words: 'Country' },
  vatNumber: { section: 5, words: 'VAT number' },
  remarks: { section: 5, words: 'Remarks' },
} as const satisfies Record<string, { section: number, words: string, quantity?: Quantity }>

export type OrderFieldName = keyof typeof ORDER_FIELDS
/** Fields that hold a choice of a few words, or a tick. */
export type OrderChoiceName = 'kind' | 'knows' | 'knowsExtension' | 'knowsTorsion' | 'certificate'
/** Fields that hold text, as typed. */
export type OrderTextName = Exclude<OrderFieldName, OrderChoiceName>
export const ORDER_FIELD_NAMES = Object.keys(ORDER_FIELDS) as OrderFieldName[]

/** The physical quantity typed into a field, if it is one. */
export function quantityOf(field: OrderFieldName): Quantity | null {
  const entry = ORDER_FIELDS[field]
  return 'quantity' in entry ? entry.quantity : null
}

/** The id of a field's control on the page. */
export const orderFieldId = (field: OrderFieldName): string => `order-${field}`
