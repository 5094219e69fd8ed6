import { z } from 'zod'
import { aboutOrder, amountField, currencyField, linkField } from '../parts/fields'

/** `balanceMinor` is what is still to be paid; nought asks for nothing. */
export const payloadSchema = z.strictObject({ ...aboutOrder, quantity: z.int().positive(), balanceMinor: amountField, currency: currencyField, orderUrl: linkField })
