/** API version that the fake models: the one stripe 23.1.0 is pinned to. */
export const API_VERSION = '2026-10-28.endive'

/** Gaps between delivery attempts, milliseconds; after the last the attempt counts as failed. */
export const DEFAULT_RETRY_GAPS_MS: readonly number[] = [500, 1000, 2000, 5000, 10_000, 30_000, ...Array.from({ length: 54 }, () => 60_000)]

/** What the fake is started with. Every field has a default except none: an empty object is a usable fake. */
export interface StripeFakeOptions {
  /** 0 picks a free port. */
  port?: number
  /** Only 127.0.0.1 is taken. */
  host?: string
  secretKey?: string
  /** Where events go; a loopback address. Null sends none. */
  webhookUrl?: string | null
  /** One secret, or several while they are being changed over. */
  webhookSecrets?: string[]
  stateFile?: string | null
  retryGapsMs?: readonly number[]
  /** How long a delivery waits for its answer. */
  answerTimeoutMs?: number
  /** How long a bank debit or a slow refund takes to settle. */
  settleAfterMs?: number
  /** Receives one line per notable thing; nothing by default. */
  log?: (line: string) => void
}

/** Options with every default filled in. */
export type ResolvedOptions = Required<StripeFakeOptions>

function isLoopback(address: string): boolean {
  return URL.canParse(address) && ['127.0.0.1', 'localhost', '[::1]'].includes(new URL(address).hostname) && new URL(address).protocol === 'http:'
}

/** Throws unless events would go to this machine only. */
export function assertWebhookUrl(address: string): void {
  if (!isLoopback(address)) throw new Error('The payment fake delivers to http addresses on this machine only (127.0.0.1, localhost).')
}

/** Fills in defaults. Throws on anything that could be mistaken for, or reach, the real world. */
export function resolveOptions(options: StripeFakeOptions): ResolvedOptions {
  const resolved: ResolvedOptions = {
    port: options.port ?? 0,
    host: options.host ?? '127.0.0.1',
    secretKey: options.secretKey ?? 'sk_test_wirewright_fake',
    webhookUrl: options.webhookUrl ?? null,
    webhookSecrets: options.webhookSecrets ?? ['whsec_wirewright_fake'],
    stateFile: options.stateFile ?? null,
    retryGapsMs: options.retryGapsMs ?? DEFAULT_RETRY_GAPS_MS,
    answerTimeoutMs: options.answerTimeoutMs ?? 10_000,
    settleAfterMs: options.settleAfterMs ?? 5000,
    log: options.log ?? (() => undefined),
  }
  if (resolved.host !== '127.0.0.1') throw new Error('The payment fake listens on 127.0.0.1 only; set STRIPE_FAKE_HOST to that or leave it out.')
  if (!resolved.secretKey.startsWith('sk_test_')) throw new Error('The payment fake takes a key that begins with sk_test_ only.')
  if (!Number.isInteger(resolved.port) || resolved.port < 0 || resolved.port > 65_535) throw new Error('STRIPE_FAKE_PORT must be a port number.')
  if (resolved.webhookUrl !== null) assertWebhookUrl(resolved.webhookUrl)
  if (resolved.webhookSecrets.length === 0 || resolved.webhookSecrets.some(secret => secret.trim() === '')) {
    throw new Error('STRIPE_FAKE_WEBHOOK_SECRET must not be empty.')
  }
  return resolved
}

/** Reads the options of a process of its own from its environment. Throws when the environment is a production one. */
export function readEnvironment(environment: Record<string, string | undefined>): StripeFakeOptions {
  if (environment.NODE_ENV === 'production') throw new Error('The payment fake does not start with NODE_ENV=production.')
  return {
    port: environment.STRIPE_FAKE_PORT ? Number(environment.STRIPE_FAKE_PORT) : 0,
    host: environment.STRIPE_FAKE_HOST || '127.0.0.1',
    secretKey: environment.STRIPE_FAKE_SECRET_KEY || undefined,
    webhookUrl: environment.STRIPE_FAKE_WEBHOOK_URL || null,
    webhookSecrets: environment.STRIPE_FAKE_WEBHOOK_SECRET?.split(',').map(secret => secret.trim()),
    stateFile: environment.STRIPE_FAKE_STATE_FILE || null,
    settleAfterMs: environment.STRIPE_FAKE_SETTLE_MS ? Number(environment.STRIPE_FAKE_SETTLE_MS) : undefined,
  }
}
