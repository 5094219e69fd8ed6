import { findTestCard, TEST_CARDS } from '../cards'
import type { TestCard } from '../cards'
import type { AttemptMethod } from '../flow/attempt'
import type { FormTable } from '../form-decoding'

/** What the payer filled in, as text, to be shown again. */
export interface PayFormValues { email: string, name: string, choice: string, number: string, expiry: string, cvc: string }

/** The names of the fields that can be wrong. */
export type PayFormErrors = Partial<Record<'email' | 'number' | 'expiry' | 'cvc' | 'choice', string>>

/** Choices of the bank debit and how each ends. */
export const DEBIT_CHOICES = {
  debit_succeeds: 'succeeded',
  debit_fails: 'failed',
} as const

/** The first three test cards, offered as one-click choices. */
export const OFFERED_CARDS: readonly TestCard[] = TEST_CARDS.slice(0, 3)

function field(form: FormTable, name: string): string {
  const value = form[name]
  return typeof value === 'string' ? value.trim().slice(0, 300) : ''
}

/** Reads the fields of the payment page; missing ones are empty. */
export function readPayForm(form: FormTable): PayFormValues {
  return {
    email: field(form, 'email'), name: field(form, 'name'), choice: field(form, 'choice') || (OFFERED_CARDS[0]?.number ?? ''),
    number: field(form, 'number'), expiry: field(form, 'expiry'), cvc: field(form, 'cvc'),
  }
}

function expiryError(expiry: string, nowMs: number): string | undefined {
  const match = /^(\d{1,2})\s*\/?\s*(\d{2}|\d{4})$/.exec(expiry)
  const month = Number(match?.[1])
  if (!match?.[2] || month < 1 || month > 12) return 'Write the month and year the card ends with, such as 12 / 34.'
  const year = Number(match[2].length === 2 ? `20${match[2]}` : match[2])
  const endOfMonth = Date.UTC(year, month, 1)
  return endOfMonth <= nowMs ? 'This date is past. Any date to come will do.' : undefined
}

/** Checks the form and says what would be tried, or what is wrong and where. */
export function checkPayForm(
  values: PayFormValues, known: { email: string | null, hasCard: boolean, hasDebit: boolean, nowMs: number },
): { method: AttemptMethod | null, errors: PayFormErrors } {
  const errors: PayFormErrors = {}
  if (known.email === null && !/^[^\s@]+@[^\s@]+\.[^\s@]+$/.test(values.email)) {
    errors.email = 'Write an e-mail address such as name@example.com.'
  }
  const debit = Object.entries(DEBIT_CHOICES).find(([choice]) => choice === values.choice)?.[1]
  if (debit) {
    if (!known.hasDebit) errors.choice = 'The bank debit is not offered for this payment. Choose a card.'
    return { method: Object.keys(errors).length > 0 ? null : { debitOutcome: debit }, errors }
  }
  if (!known.hasCard) errors.choice = 'Cards are not offered for this payment. Choose the bank debit.'
  const isTyped = values.number !== ''
  const card = findTestCard(isTyped ? values.number : values.choice)
  if (!card && isTyped) errors.number = 'This is none of the test numbers. Never type the number of a real card here; use one from the list.'
  else if (!card) errors.choice = 'Choose one of the test cards, or type a test number.'
  if (isTyped && values.expiry !== '') {
    const wrong = expiryError(values.expiry, known.nowMs)
    if (wrong) errors.expiry = wrong
  }
  if (isTyped && values.cvc !== '' && !/^\d{3,4}$/.test(values.cvc)) errors.cvc = 'The security code has three or four digits. Any will do.'
  return { method: card && Object.keys(errors).length === 0 ? { card } : null, errors }
}
