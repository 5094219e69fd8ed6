import { z } from 'zod'
import { aboutOrder, amountField, currencyField, linkField } from '../parts/fields'

/** `balanceMinor` is what is left to pay once the springs are finished; nought when the whole was paid. */
export const payloadSchema = z.strictObject({
  ...aboutOrder, quantity: z.int().positive(), amountMinor: amountField, balanceMinor: amountField, currency: currencyField, orderUrl: linkField,
})
