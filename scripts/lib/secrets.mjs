import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'

/**
 * @typedef {object} Secrets
 * @property {string} databaseAdminPassword
 * @property {string} databaseOwnerPassword
 * @property {string} databaseAppPassword
 * @property {string} stripeSecretKey known to the Stripe fake and the app only
 * @property {string} stripeWebhookSecret
 */

/** @returns {Secrets} */
export function makeSecrets() {
  const random = () => randomBytes(24).toString('base64url')
  // The word in the key lets a production start recognise and refuse it.
  return {
    databaseAdminPassword: random(),
    databaseOwnerPassword: random(),
    databaseAppPassword: random(),
    stripeSecretKey: `sk_test_wirewright_fake_${randomBytes(24).toString('hex')}`,
    stripeWebhookSecret: `whsec_${randomBytes(24).toString('hex')}`,
  }
}

/**
 * The secrets kept in a file only its owner can read; made at the first start.
 * @param {string} path
 * @returns {Secrets}
 */
export function readOrMakeSecrets(path) {
  if (existsSync(path)) return JSON.parse(readFileSync(path, 'utf8'))
  const secrets = makeSecrets()
  writeFileSync(path, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600, flag: 'wx' })
  return secrets
}
