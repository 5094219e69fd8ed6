import { z } from 'zod'

/** The link is made when the mail is sent, so the payload holds none. */
export const payloadSchema = z.strictObject({ name: z.string() })
