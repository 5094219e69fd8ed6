import { z } from 'zod'
import { aboutOrder, dayField, linkField } from '../parts/fields'

/** `leavesOn` is the day the springs leave us, by the plan. */
export const payloadSchema = z.strictObject({ ...aboutOrder, leavesOn: dayField, orderUrl: linkField })
