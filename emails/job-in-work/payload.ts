import { z } from 'zod'
import { aboutOrder, dayField, linkField } from '../parts/fields'

export const payloadSchema = z.strictObject({ ...aboutOrder, quantity: z.int().positive(), leavesOn: dayField.nullable(), orderUrl: linkField })
