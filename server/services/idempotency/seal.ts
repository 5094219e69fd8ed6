import { createCipheriv, createDecipheriv, createHash, hkdfSync, randomBytes } from 'node:crypto'

// An answer may hold the secret of a link. It is kept so that only who sent the request, and so holds the client's key, can read it again.
const keyOf = (clientKey: string) => Buffer.from(hkdfSync('sha256', clientKey, 'wirewright', 'first answer', 32))

/** What is stored of a client's key: not the key itself, which opens the kept answer. */
export const hashClientKey = (clientKey: string): string => createHash('sha256').update(clientKey).digest('base64url')

/** Encrypts text (AES-256-GCM) under a client's key. */
export function seal(text: string, clientKey: string): string {
  const nonce = randomBytes(12)
  const cipher = createCipheriv('aes-256-gcm', keyOf(clientKey), nonce)
  return Buffer.concat([nonce, cipher.update(text, 'utf8'), cipher.final(), cipher.getAuthTag()]).toString('base64url')
}

/**
 * Decrypts what `seal` made.
 * @throws Error when it was changed or the key is another
 */
export function unseal(sealed: string, clientKey: string): string {
  const bytes = Buffer.from(sealed, 'base64url')
  const decipher = createDecipheriv('aes-256-gcm', keyOf(clientKey), bytes.subarray(0, 12))
  decipher.setAuthTag(bytes.subarray(-16))
  return Buffer.concat([decipher.update(bytes.subarray(12, -16)), decipher.final()]).toString('utf8')
}
