import { describe, expect, it } from 'vitest'
import { parseSettings } from '#server/utils/settings'

const real = {
  databaseUrl: 'postgresql://wirewright_app@db.example/wirewright', mode: 'production', origin: 'https://springs.example', trustedProxies: '', limits: 'on', shopTimeZone: 'Europe/Dublin',
  stripe: { secretKey: 'sk_live_x', webhookSecrets: 'whsec_a,whsec_b', host: '', port: '', protocol: 'https', livemode: 'true' },
  smtp: { host: 'mail.example', port: '587', secure: 'false', user: '', password: '' }, mail: { from: 'Springs <orders@springs.example>', replyTo: '' },
}

describe('the settings of a real shop (S-38, FK-8)', () => {
  it('are taken as they are, with both webhook secrets while one is being changed over', () => {
    expect(parseSettings(real)).toMatchObject({ mode: 'production', stripe: { webhookSecrets: ['whsec_a', 'whsec_b'], livemode: true } })
    expect(parseSettings({ ...real, stripe: { ...real.stripe, secretKey: 'rk_test_x', livemode: 'false' } }).stripe.livemode).toBe(false)
  })

  it.each([
    ['a host of a fake', { stripe: { ...real.stripe, host: '127.0.0.1' } }, /the fake of Stripe is configured/],
    ['a key of a fake', { stripe: { ...real.stripe, secretKey: 'sk_test_wirewright_fake_0', livemode: 'false' } }, /the fake of Stripe is configured/],
    ['a live key in test mode', { stripe: { ...real.stripe, livemode: 'false' } }, /LIVEMODE does not fit/],
    ['a test key in live mode', { stripe: { ...real.stripe, secretKey: 'sk_test_x' } }, /LIVEMODE does not fit/],
    ['limits that are off', { limits: 'off' }, /rate limits are off/],
    ['an origin that is not https', { origin: 'http://springs.example' }, /not https/],
    ['the sender of the demonstration', { mail: { from: 'Oxmere Spring Works <orders@oxmere.invalid>', replyTo: '' } }, /demo address/],
    ['no secret of the webhook', { stripe: { ...real.stripe, webhookSecrets: '' } }, /NUXT_STRIPE_WEBHOOK_SECRETS is missing/],
    ['no such time zone', { shopTimeZone: 'Europe/Oxmere' }, /NUXT_SHOP_TIME_ZONE/],
  ])('are refused with %s', (_what, change, words) => {
    expect(() => parseSettings({ ...real, ...change })).toThrow(words)
  })
})
