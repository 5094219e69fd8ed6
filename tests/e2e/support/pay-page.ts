import { expect, type Locator, type Page } from '@playwright/test'

/** The hosted page of the payment fake. */
export class PayPage {
  constructor(readonly page: Page) {}

  /** Waits for the page; it writes the currency's code where we write its sign. */
  async isOpen(amount: string): Promise<void> {
    await expect(this.page.getByRole('heading', { level: 1, name: `Pay ${amount.replace('€', 'EUR ')}` })).toBeVisible()
  }

  async fillEmail(email: string): Promise<void> {
    await this.page.getByLabel('E-mail address').fill(email)
  }

  async choose(card: 'The payment works' | 'The bank declines it' | 'The bank asks for a second step'): Promise<void> {
    await this.page.getByRole('radio', { name: card }).check()
  }

  get pay(): Locator { return this.page.getByRole('button', { name: /^Pay / }) }
  get summary(): Locator { return this.page.getByRole('alert') }
}
