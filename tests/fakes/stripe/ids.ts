import { randomBytes } from 'node:crypto'

const ALPHABET = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789'

/** Random letters and digits; bytes above the last full multiple of 62 are thrown away so that no letter is likelier. */
function randomLetters(length: number): string {
  let letters = ''
  while (letters.length < length) {
    for (const byte of randomBytes(length)) {
      if (byte < 248 && letters.length < length) letters += ALPHABET[byte % 62]
    }
  }
  return letters
}

/** Prefix of each kind of object, as the service documents them (FK-3). */
export const ID_PREFIXES = {
  session: 'cs_test_a1',
  paymentIntent: 'pi_3',
  charge: 'ch_3',
  refund: 're_3',
  customer: 'cus_',
  event: 'evt_1',
  lineItem: 'li_1',
  price: 'price_1',
  product: 'prod_',
  paymentMethod: 'pm_1',
  balanceTransaction: 'txn_3',
  dispute: 'du_1',
  request: 'req_',
} as const

const LENGTHS: Partial<Record<keyof typeof ID_PREFIXES, number>> = { session: 58, customer: 14, product: 14, request: 14 }

/** A new identifier with the prefix of its kind. */
export function createId(kind: keyof typeof ID_PREFIXES): string {
  return ID_PREFIXES[kind] + randomLetters(LENGTHS[kind] ?? 23)
}

/** A secret for the browser: the object's id, the word `secret` and random letters. */
export function createClientSecret(id: string): string {
  return `${id}_secret_${randomLetters(25)}`
}
