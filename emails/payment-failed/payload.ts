import { z } from 'zod'
import { aboutOrder, amountField, currencyField, linkField } from '../parts/fields'

export const payloadSchema = z.strictObject({ ...aboutOrder, paymentKind: z.enum(['deposit', 'balance']), amountMinor: amountField, currency: currencyField, orderUrl: linkField })
