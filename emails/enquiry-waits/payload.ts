import { z } from 'zod'
import { aboutOrder, linkField, momentField } from '../parts/fields'

/** `reasons` are the customer's sentences; `answerBy` is when a person will have answered. */
export const payloadSchema = z.strictObject({ ...aboutOrder, quoteUrl: linkField, reasons: z.array(z.string()), answerBy: momentField.nullable() })
