import { z } from 'zod'

export const ROLES = ['customer', 'estimator', 'supervisor', 'operator', 'bookkeeper', 'admin'] as const
export const roleSchema = z.enum(ROLES)
export type Role = z.infer<typeof roleSchema>

/** Roles of the people who work here. */
export const STAFF_ROLES = ['estimator', 'supervisor', 'operator', 'bookkeeper', 'admin'] as const satisfies readonly Role[]
