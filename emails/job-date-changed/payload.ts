import { z } from 'zod'
import { aboutOrder, dayField, linkField } from '../parts/fields'

export const payloadSchema = z.strictObject({ ...aboutOrder, leavesOn: dayField, previouslyOn: dayField, orderUrl: linkField })
