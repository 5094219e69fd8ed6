import { z } from 'zod'
import { quoteFields } from '../parts/fields'

export const payloadSchema = z.strictObject(quoteFields)
