import { z } from 'zod'
import { aboutOrder, amountField, currencyField, linkField } from '../parts/fields'

export const payloadSchema = z.strictObject({ ...aboutOrder, quantity: z.int().positive(), balanceMinor: amountField, currency: currencyField, orderUrl: linkField })
