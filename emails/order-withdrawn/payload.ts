import { z } from 'zod'
import { aboutOrder } from '../parts/fields'

/** `reason` is the sentence that was given, or empty. */
export const payloadSchema = z.strictObject({ ...aboutOrder, withdrawnBy: z.enum(['customer', 'works']), reason: z.string() })
