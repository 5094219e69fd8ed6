import { describe, expect, it } from 'vitest'
import { buildAppEnv, buildMigrationEnv, buildStripeFakeEnv, type Surroundings } from '../../../scripts/lib/app-env.mjs'
import { makeSecrets } from '../../../scripts/lib/secrets.mjs'
import { parseSettings } from '../../../server/utils/settings'

const surroundings = (mode: Surroundings['mode']): Surroundings => ({
  mode,
  ports: { app: 4000, stripeFake: 4001, smtp: 4002, mailWeb: 4003, postgres: 4004 },
  secrets: makeSecrets(),
  stripeStateFile: 'stripe.json',
  mailFolder: 'mail',
  demoSignInsFile: 'sign-ins.json',
})

/** What Nuxt makes of the environment for the settings that parseSettings reads. */
const settingsFrom = (env: NodeJS.ProcessEnv) => ({
  databaseUrl: env.NUXT_DATABASE_URL, mode: env.NUXT_MODE, origin: env.NUXT_ORIGIN, trustedProxies: '', limits: env.NUXT_LIMITS, shopTimeZone: 'Europe/Dublin',
  stripe: { secretKey: env.NUXT_STRIPE_SECRET_KEY, webhookSecrets: env.NUXT_STRIPE_WEBHOOK_SECRETS, host: env.NUXT_STRIPE_HOST, port: env.NUXT_STRIPE_PORT, protocol: env.NUXT_STRIPE_PROTOCOL, livemode: 'false' },
  smtp: { host: env.NUXT_SMTP_HOST, port: env.NUXT_SMTP_PORT, secure: env.NUXT_SMTP_SECURE, user: '', password: '' },
  mail: { from: env.NUXT_MAIL_FROM, replyTo: '' },
})

describe('the environment of the app', () => {
  it.each(['demo', 'test'] as const)('holds everything the settings ask for in mode %s', (mode) => {
    expect(parseSettings(settingsFrom(buildAppEnv(surroundings(mode))))).toMatchObject({ mode, origin: 'http://127.0.0.1:4000', stripe: { host: '127.0.0.1', port: 4001 }, smtp: { port: 4002, secure: false } })
  })

  it('is refused by a production start', () => {
    const settings = { ...settingsFrom(buildAppEnv(surroundings('demo'))), mode: 'production' }
    expect(() => parseSettings(settings)).toThrow(/Production start refused: the fake of Stripe is configured/)
  })

  it('has the rate limits on in the demo shop', () => {
    expect(buildAppEnv(surroundings('demo')).NUXT_LIMITS).toBe('on')
  })

  it('never holds the password of the role that owns the tables', () => {
    const demo = surroundings('demo')
    expect(JSON.stringify(buildAppEnv(demo))).not.toContain(demo.secrets.databaseOwnerPassword)
    expect(JSON.stringify(buildMigrationEnv(demo))).toContain(demo.secrets.databaseOwnerPassword)
  })

  it('shares its key and its webhook secret with the Stripe fake, which delivers to it', () => {
    const demo = surroundings('demo')
    const [app, fake] = [buildAppEnv(demo), buildStripeFakeEnv(demo)]
    expect([fake.STRIPE_FAKE_SECRET_KEY, fake.STRIPE_FAKE_WEBHOOK_SECRET]).toEqual([app.NUXT_STRIPE_SECRET_KEY, app.NUXT_STRIPE_WEBHOOK_SECRETS])
    expect(fake.STRIPE_FAKE_WEBHOOK_URL).toBe('http://127.0.0.1:4000/api/webhooks/stripe')
  })

  it('lets a second process listen elsewhere while the links stay those of the first', () => {
    expect(buildAppEnv(surroundings('test'), 4990)).toMatchObject({ NITRO_PORT: '4990', NUXT_ORIGIN: 'http://127.0.0.1:4000' })
  })
})
