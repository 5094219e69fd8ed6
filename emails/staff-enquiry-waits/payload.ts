import { z } from 'zod'
import { linkField, momentField } from '../parts/fields'

/** `reasons` are the estimator's sentences; `estimatingUrl` opens the enquiry in Estimating. */
export const payloadSchema = z.strictObject({
  orderRef: z.string(), title: z.string(), firm: z.string(), reasons: z.array(z.string()), answerBy: momentField.nullable(), estimatingUrl: linkField,
})
