import Stripe from 'stripe'

/** Stripe's own tolerance for old stamps; the SDK does not look the other way, so stamps from the future are refused here. */
const MOST_AHEAD_S = 300
const LONGEST_HEADER = 4096

export type Verified = { is: 'event', event: unknown } | { is: 'forged' } | { is: 'unreadable' }

/**
 * The event of a webhook, when its signature fits one of the secrets that are active and its stamp is near the present. Several
 * secrets are active while they are being changed over. A thin notification is signed and yet unreadable: it holds no object.
 */
export async function verifyEvent(raw: Buffer, signature: string | undefined, secrets: readonly string[], nowS: number): Promise<Verified> {
  const stampS = Number(/(?:^|,)t=(\d{1,12})(?:,|$)/.exec(signature ?? '')?.[1] ?? Number.NaN)
  if (!signature || signature.length > LONGEST_HEADER || !Number.isFinite(stampS) || stampS - nowS > MOST_AHEAD_S) return { is: 'forged' }
  for (const secret of secrets) {
    try {
      return { is: 'event', event: await Stripe.webhooks.constructEventAsync(raw, signature, secret) }
    }
    catch (error) {
      // The SDK checks the signature first, so any other error is about a body that is truly Stripe's.
      if (!(error instanceof Stripe.errors.StripeSignatureVerificationError)) return { is: 'unreadable' }
    }
  }
  return { is: 'forged' }
}
