import { z } from 'zod'
import { aboutOrder, linkField } from '../parts/fields'

export const payloadSchema = z.strictObject({ ...aboutOrder, quoteUrl: linkField })
