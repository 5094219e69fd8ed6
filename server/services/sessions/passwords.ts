import { hash, verify } from '@node-rs/argon2'
import { createSecret } from './token'

/** Argon2id with 19 MiB, 2 passes, 1 lane (OWASP Password Storage Cheat Sheet). 2 is the library's number of Argon2id. */
const OPTIONS = { algorithm: 2, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const

/** The hash of a password with its parameters and salt, as PHC text. */
export const hashPassword = (password: string): Promise<string> => hash(password, OPTIONS)

let nobody: Promise<string> | undefined

/**
 * True where the password is the one that was hashed. Without a hash the same work is done on one that nothing fits, so that
 * the time of the answer does not tell which addresses have an account.
 */
export async function isPassword(passwordHash: string | null, password: string): Promise<boolean> {
  nobody ??= hashPassword(createSecret())
  const fits = await verify(passwordHash ?? await nobody, password)
  return passwordHash !== null && fits
}
