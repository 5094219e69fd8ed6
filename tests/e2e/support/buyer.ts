import { expect, request, type APIRequestContext } from '@playwright/test'
import type { EnquiryInput } from '#shared/schemas/enquiry'
import type { EnquiryOutcome, OrderStatusView, QuoteView } from '#shared/schemas/quote'
import type { TestServices } from '../../../scripts/lib/test-shop.mjs'
import { createStripeFakeControl } from '../../fakes/stripe/control-client'
import { linkIn, Mailbox } from './mailbox'

const REQUIREMENT: EnquiryInput['requirement'] = {
  kind: 'compression', need: { knows: 'two-loads', first: { forceN: 60, lengthMm: 50 }, second: { forceN: 150, lengthMm: 35 } }, boreMm: 24, rodMm: 14, couldHurt: 'no', quantities: [50, 200, 500],
}

/** A customer without a browser: brings an order to where a test begins, through the routes that the pages use. */
export class Buyer {
  readonly email: string
  private constructor(private readonly api: APIRequestContext, private readonly services: TestServices, readonly name: string) {
    this.email = `${name.toLowerCase().replace(/[^a-z]+/g, '.')}@buyer.example`
  }

  static async create(services: TestServices, name: string): Promise<Buyer> {
    return new Buyer(await request.newContext({ baseURL: services.baseUrl, extraHTTPHeaders: { 'x-wirewright': '1' } }), services, name)
  }

  async sendEnquiry(title: string, requirement: Partial<Extract<EnquiryInput['requirement'], { kind: 'compression' }>> = {}): Promise<EnquiryOutcome> {
    const data: EnquiryInput = { requirement: { ...REQUIREMENT, ...requirement } as EnquiryInput['requirement'], contact: { name: this.name, firm: `${this.name} & Daughters`, email: this.email, countryCode: 'IE', title } }
    return this.post<EnquiryOutcome>('/api/enquiries', data, { 'idempotency-key': crypto.randomUUID() })
  }

  async accept({ ref, key }: EnquiryOutcome, quantity: number): Promise<void> {
    const quote = await this.get<QuoteView>(`/api/quotes/${ref}?key=${key}`)
    await this.post(`/api/quotes/${ref}/accept`, { quantity, version: quote.version, key })
  }

  /** Confirms the address by the e-mailed link, which signs in, and pays the deposit. */
  async payDeposit({ ref }: EnquiryOutcome): Promise<void> {
    const mail = await new Mailbox(this.services.mailUrl).waitFor(this.email, /address/i)
    const token = new URL(linkIn(mail, '/link/')).pathname.split('/').at(-1)
    await this.post('/api/auth/use-link', { token })
    const { url } = await this.post<{ url: string }>(`/api/orders/${ref}/pay`, { kind: 'deposit' })
    const sessionId = new URL(url).pathname.split('/').at(-1) ?? ''
    await createStripeFakeControl({ url: this.services.stripeFakeUrl, secretKey: this.services.stripeSecretKey }).setOutcome(sessionId, 'paid', { email: this.email, name: this.name })
    await expect.poll(async () => (await this.get<OrderStatusView>(`/api/orders/${ref}`)).state, { timeout: 15_000 }).toBe('deposit-paid')
  }

  async close(): Promise<void> {
    await this.api.dispose()
  }

  private async get<Answer>(path: string): Promise<Answer> {
    const response = await this.api.get(path)
    expect(response.status(), path).toBe(200)
    return await response.json() as Answer
  }

  private async post<Answer>(path: string, data: object, headers: Record<string, string> = {}): Promise<Answer> {
    const response = await this.api.post(path, { data, headers })
    expect(response.ok(), `${path}: ${await response.text()}`).toBe(true)
    return await response.json() as Answer
  }
}
