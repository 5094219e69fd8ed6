import { createHmac } from 'node:crypto'

/**
 * The signature header of one delivery: `t=<seconds>,v1=<HMAC-SHA256 of "t.body">`, one v1 per secret.
 * `isBad` signs with a key that nobody has, so that the form is right and the proof is wrong.
 */
export function signatureHeader(body: string, secrets: readonly string[], timestampS: number, isBad: boolean): string {
  const keys = isBad ? ['not-the-secret'] : secrets
  const proofs = keys.map(key => createHmac('sha256', key).update(`${timestampS}.${body}`, 'utf8').digest('hex'))
  return [`t=${timestampS}`, ...proofs.map(proof => `v1=${proof}`)].join(',')
}
