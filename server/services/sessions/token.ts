import { createHash, randomBytes } from 'node:crypto'

/** 256 random bits in base64url, 43 characters. */
export const createSecret = (): string => randomBytes(32).toString('base64url')
/** What is stored of a secret. */
export const hashSecret = (secret: string): Buffer => createHash('sha256').update(secret).digest()
