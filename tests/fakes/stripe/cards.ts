/** What a test card does when it is used. */
export interface TestCard {
  /** Digits only. */
  number: string
  /** What it is for, in the words of the payment page. */
  purpose: string
  brand: 'visa' | 'mastercard'
  outcome: 'succeeds' | 'declines' | 'asks'
  code?: string
  declineCode?: string
  message?: string
  /** How a refund of its payment goes, if not at once. */
  refund?: 'pendingThenSucceeds' | 'succeedsThenFails'
  /** The payment is disputed as soon as it is captured. */
  isDisputed?: boolean
}

/** The service's published test numbers; the first three are from the task, the rest from memory of the testing page. */
export const TEST_CARDS: readonly TestCard[] = [
  { number: '4242424242424242', purpose: 'The payment works', brand: 'visa', outcome: 'succeeds' },
  { number: '4000000000000002', purpose: 'The bank declines it', brand: 'visa', outcome: 'declines', code: 'card_declined', declineCode: 'generic_decline', message: 'Your card was declined.' },
  { number: '4000002500003155', purpose: 'The bank asks for a second step', brand: 'visa', outcome: 'asks' },
  { number: '5555555555554444', purpose: 'The payment works (another brand)', brand: 'mastercard', outcome: 'succeeds' },
  { number: '4000000000009995', purpose: 'Declined: not enough funds', brand: 'visa', outcome: 'declines', code: 'card_declined', declineCode: 'insufficient_funds', message: 'Your card has insufficient funds.' },
  { number: '4000000000000069', purpose: 'Declined: the card has expired', brand: 'visa', outcome: 'declines', code: 'expired_card', message: 'Your card has expired.' },
  { number: '4000000000000127', purpose: 'Declined: wrong security code', brand: 'visa', outcome: 'declines', code: 'incorrect_cvc', message: 'Your card’s security code is incorrect.' },
  { number: '4000000000000119', purpose: 'Declined: a fault while processing', brand: 'visa', outcome: 'declines', code: 'processing_error', message: 'An error occurred while processing your card. Try again in a little bit.' },
  { number: '4000000000000259', purpose: 'Works, and is disputed afterwards', brand: 'visa', outcome: 'succeeds', isDisputed: true },
  { number: '4000000000007726', purpose: 'Works; a refund takes a while', brand: 'visa', outcome: 'succeeds', refund: 'pendingThenSucceeds' },
  { number: '4000000000005126', purpose: 'Works; a refund fails later', brand: 'visa', outcome: 'succeeds', refund: 'succeedsThenFails' },
]

/** The test card with this number (spaces and hyphens are ignored), or nothing: real numbers are never taken. */
export function findTestCard(typedNumber: string): TestCard | undefined {
  const digits = typedNumber.replace(/[\s-]/g, '')
  return TEST_CARDS.find(card => card.number === digits)
}

/** A test card by number; throws when the number is not in the table. */
export function getTestCard(number: string): TestCard {
  const card = findTestCard(number)
  if (!card) throw new Error(`No test card ${number}`)
  return card
}

/** Digits in groups of four, as printed on a card. */
export function groupDigits(number: string): string {
  return number.replace(/(\d{4})(?=\d)/g, '$1 ')
}
