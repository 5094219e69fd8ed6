import { APP_ROLE, OWNER_ROLE, databaseUrl } from './postgres-roles.mjs'

/**
 * @typedef {object} Surroundings everything the programs of the demo shop must be told
 * @property {import('./ports.mjs').ServicePorts} ports
 * @property {import('./secrets.mjs').Secrets} secrets
 * @property {string} stripeStateFile where the Stripe fake keeps what it knows
 * @property {string} mailFolder
 * @property {string} demoSignInsFile written by the seed: [{ role, email, password }]
 * @property {'demo' | 'test'} mode never production: both allow the fakes and the demo sign-ins
 */

/**
 * The address people reach the app at, as put in links and sent to the payment host.
 * @param {Surroundings} surroundings
 */
export function siteUrl({ ports }) {
  return `http://127.0.0.1:${ports.app}`
}

/**
 * What every program of ours inherits from the shell: enough to run, and nothing that would change how it behaves.
 * @returns {NodeJS.ProcessEnv}
 */
function inheritedEnv() {
  const { PATH, HOME, USER, LANG, TMPDIR, TZ } = process.env
  return { PATH, HOME, USER, LANG, TMPDIR, TZ, NUXT_TELEMETRY_DISABLED: '1' }
}

/**
 * @param {Surroundings} surroundings
 * @returns {NodeJS.ProcessEnv}
 */
export function buildMigrationEnv(surroundings) {
  const { ports, secrets, demoSignInsFile, mode } = surroundings
  return {
    ...inheritedEnv(),
    WIREWRIGHT_MODE: mode,
    NUXT_DATABASE_OWNER_URL: databaseUrl(ports.postgres, OWNER_ROLE, secrets.databaseOwnerPassword),
    NUXT_DATABASE_URL: databaseUrl(ports.postgres, APP_ROLE, secrets.databaseAppPassword),
    WIREWRIGHT_APP_ROLE: APP_ROLE,
    WIREWRIGHT_DEMO_SIGN_INS_FILE: demoSignInsFile,
    NUXT_ORIGIN: siteUrl(surroundings),
  }
}

/**
 * @param {Surroundings} surroundings
 * @param {number} [port] of a second app process beside the first; the links stay those of the first
 * @returns {NodeJS.ProcessEnv}
 */
export function buildAppEnv(surroundings, port = surroundings.ports.app) {
  const { ports, secrets, mode } = surroundings
  return {
    ...inheritedEnv(),
    WIREWRIGHT_MODE: mode,
    NUXT_MODE: mode,
    // Tests send thousands of requests from one address; the ones about limits start an app of their own with them on.
    NUXT_LIMITS: mode === 'test' ? 'off' : 'on',
    NITRO_HOST: '127.0.0.1',
    NITRO_PORT: String(port),
    NUXT_ORIGIN: siteUrl(surroundings),
    NUXT_DATABASE_URL: databaseUrl(ports.postgres, APP_ROLE, secrets.databaseAppPassword),
    NUXT_STRIPE_SECRET_KEY: secrets.stripeSecretKey,
    NUXT_STRIPE_WEBHOOK_SECRETS: secrets.stripeWebhookSecret,
    NUXT_STRIPE_HOST: '127.0.0.1',
    NUXT_STRIPE_PORT: String(ports.stripeFake),
    NUXT_STRIPE_PROTOCOL: 'http',
    NUXT_SMTP_HOST: '127.0.0.1',
    NUXT_SMTP_PORT: String(ports.smtp),
    NUXT_SMTP_SECURE: 'false',
    NUXT_MAIL_FROM: 'Oxmere Spring Works <orders@oxmere.invalid>',
  }
}

/**
 * @param {Surroundings} surroundings
 * @returns {NodeJS.ProcessEnv}
 */
export function buildStripeFakeEnv(surroundings) {
  const { ports, secrets, stripeStateFile } = surroundings
  return {
    ...inheritedEnv(),
    STRIPE_FAKE_PORT: String(ports.stripeFake),
    STRIPE_FAKE_SECRET_KEY: secrets.stripeSecretKey,
    STRIPE_FAKE_WEBHOOK_URL: `${siteUrl(surroundings)}/api/webhooks/stripe`,
    STRIPE_FAKE_WEBHOOK_SECRET: secrets.stripeWebhookSecret,
    STRIPE_FAKE_STATE_FILE: stripeStateFile,
  }
}

/**
 * @param {Surroundings} surroundings
 * @returns {NodeJS.ProcessEnv}
 */
export function buildMailInboxEnv({ ports, mailFolder }) {
  return {
    ...inheritedEnv(),
    MAIL_INBOX_SMTP_PORT: String(ports.smtp),
    MAIL_INBOX_WEB_PORT: String(ports.mailWeb),
    MAIL_INBOX_FOLDER: mailFolder,
  }
}

/** @returns {NodeJS.ProcessEnv} */
export function buildBuildEnv() {
  return inheritedEnv()
}
