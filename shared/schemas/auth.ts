import { z } from 'zod'
import { emailSchema, linkTokenSchema } from './shared-fields'
import { roleSchema } from './roles'

export const signInBodySchema = z.strictObject({ email: emailSchema, password: z.string().min(1, 'Give your password.').max(256) })
export const signInLinkBodySchema = z.strictObject({ email: emailSchema })
export const useLinkBodySchema = z.strictObject({ token: linkTokenSchema })
/** At least eight characters, any of them; a longer one is better. */
export const newPasswordSchema = z.string().min(8, 'At least 8 characters; 15 are better.').max(256, 'At most 256 characters.')
export const changePasswordBodySchema = z.strictObject({ oldPassword: z.string().max(256).optional(), newPassword: newPasswordSchema })

/** Who is signed in, as the browser may know it. */
export const sessionUserSchema = z.object({
  id: z.uuid(), name: z.string(), email: z.string(), roles: z.array(roleSchema), companyName: z.string().nullable(),
})
export type SessionUser = z.infer<typeof sessionUserSchema>

/** What a used link opened: where the browser goes next. */
export type UsedLink = { user: SessionUser, orderRef: string | null }
