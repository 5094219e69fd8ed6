import { z } from 'zod'
import { emailSchema, linkTokenSchema } from './shared-fields'
import { roleSchema, type Role } from './roles'

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

/** A place where the person is signed in. Moments as ISO text. */
export type SessionRow = { id: string, startedAt: string, lastSeenAt: string, expiresAt: string, isThisOne: boolean }

/** Somebody who can sign in, as an administrator sees them. */
export type PersonRow = {
  id: string, name: string, email: string, companyName: string | null, roles: Role[], isDemo: boolean, isDisabled: boolean, hasPassword: boolean,
  emailConfirmedAt: string | null, liveSessions: number, lastSeenAt: string | null,
}
export type PeopleView = { rows: PersonRow[], nextCursor: string | null }
