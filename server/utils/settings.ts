import { z } from 'zod'

const list = z.string().transform(text => text.split(',').map(part => part.trim()).filter(Boolean))
const flag = z.union([z.boolean(), z.enum(['true', 'false', '']).transform(text => text === 'true')])
const port = z.union([z.number(), z.string()]).transform(Number).pipe(z.number().int().min(1).max(65_535))

function isTimeZone(name: string): boolean {
  try {
    return new Intl.DateTimeFormat('en', { timeZone: name }).format(0) !== ''
  }
  catch {
    return false
  }
}

const settingsSchema = z.object({
  databaseUrl: z.string().min(1, 'NUXT_DATABASE_URL is missing: the address of the PostgreSQL database.'),
  mode: z.enum(['production', 'demo', 'test']),
  origin: z.url('NUXT_ORIGIN is missing: the address under which customers reach this site.'),
  trustedProxies: list,
  limits: z.enum(['on', 'off']),
  shopTimeZone: z.string().refine(isTimeZone, 'NUXT_SHOP_TIME_ZONE is no time zone, such as Europe/Dublin.'),
  stripe: z.object({
    secretKey: z.string().min(1, 'NUXT_STRIPE_SECRET_KEY is missing.'),
    webhookSecrets: list.refine(secrets => secrets.length > 0, 'NUXT_STRIPE_WEBHOOK_SECRETS is missing.'),
    host: z.string(),
    port: z.union([z.literal(''), port]),
    protocol: z.enum(['http', 'https']),
    livemode: flag,
  }),
  smtp: z.object({ host: z.string().min(1, 'NUXT_SMTP_HOST is missing.'), port, secure: flag, user: z.string(), password: z.string() }),
  mail: z.object({ from: z.string().min(1), replyTo: z.string() }),
})
export type Settings = z.infer<typeof settingsSchema>

/**
 * Parses the deployment's settings and refuses what must not run together: in production neither the fake of Stripe nor
 * lifted limits are accepted.
 * @throws Error that names each wrong setting
 */
export function parseSettings(raw: unknown): Settings {
  const parsed = settingsSchema.safeParse(raw)
  if (!parsed.success) throw new Error(`Settings: ${parsed.error.issues.map(issue => `${issue.path.join('.')}: ${issue.message}`).join('; ')}`)
  const settings = parsed.data
  if (settings.mode === 'production') {
    const wrong: string[] = []
    if (settings.stripe.host !== '' || settings.stripe.protocol === 'http' || settings.stripe.secretKey.includes('fake')) wrong.push('the fake of Stripe is configured')
    // Otherwise every event of Stripe would be of the wrong mode, and money that came would move nothing.
    if (/^[a-z]+_(live|test)_/.exec(settings.stripe.secretKey)?.[1] !== (settings.stripe.livemode ? 'live' : 'test')) wrong.push('NUXT_STRIPE_LIVEMODE does not fit the secret key')
    if (settings.limits === 'off') wrong.push('rate limits are off')
    if (!settings.origin.startsWith('https://')) wrong.push('NUXT_ORIGIN is not https')
    if (/\.invalid\b/.test(settings.mail.from)) wrong.push('NUXT_MAIL_FROM is the demo address')
    if (wrong.length > 0) throw new Error(`Production start refused: ${wrong.join('; ')}.`)
  }
  return settings
}

let parsed: Settings | undefined
/** The settings of this process, parsed once. */
export function useSettings(): Settings {
  parsed ??= parseSettings(useRuntimeConfig())
  return parsed
}
