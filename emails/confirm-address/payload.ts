import { z } from 'zod'
import { aboutOrder, amountField, currencyField } from '../parts/fields'

/** The link is made when the mail is sent, so the payload holds none. */
export const payloadSchema = z.strictObject({ ...aboutOrder, quantity: z.int().positive(), grossMinor: amountField, depositMinor: amountField, currency: currencyField })
