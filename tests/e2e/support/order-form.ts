import { expect, type Locator, type Page } from '@playwright/test'

/** Fields of the order form by the words on the page. */
const FIELDS = {
  firstForce: /^First, it (pushes|pulls) with/, firstLength: /^at a length of/, secondForce: /^Then it (pushes|pulls) with/, secondLength: /^at the (shorter|longer) length of/,
  firstMoment: /^First, it turns back with/, firstAngle: /^at an angle of/, secondMoment: /^Then it turns back with/, secondAngle: /^at the greater angle of/, firstLeg: /^First leg/, secondLeg: /^Second leg/,
  rate: /^Its rate is/, freeLength: /^Length when free/,
  bore: /^Works inside a bore of/, rod: /^Works over a rod of/, strokes: /^Strokes in its life/,
  quantity1: /^First$/, quantity2: /^Second$/, quantity3: /^Third$/, quantity4: /^Fourth$/, quantity5: /^Fifth$/, quantity6: /^Sixth$/,
  title: /^What is it for\?/, name: /^Your name/, firm: /^Firm/, email: /^E-mail/, remarks: /^Anything else/,
} as const
export type FieldName = keyof typeof FIELDS

/** The order form as a visitor uses it. */
export class OrderForm {
  constructor(readonly page: Page) {}

  async open(): Promise<void> {
    await this.page.goto('/order')
    await expect(this.send).toBeEnabled()
  }

  get send(): Locator { return this.page.getByRole('button', { name: /^Send, and get the quote/ }) }
  get view(): Locator { return this.page.getByRole('complementary', { name: 'Your spring' }) }
  /** The drawing of the spring that was found, told by its words. */
  get drawing(): Locator { return this.view.getByRole('img', { name: /^(Compression spring in side view|Extension spring in side view|Torsion spring seen from its end)/ }) }
  field(name: FieldName): Locator { return this.page.getByRole('textbox', { name: FIELDS[name] }) }

  async fill(values: Partial<Record<FieldName, string>>): Promise<void> {
    for (const [name, value] of Object.entries(values)) await this.field(name as FieldName).fill(value)
  }

  /** Which way the spring works. */
  async choose(words: 'It pushes' | 'It pulls' | 'It twists'): Promise<void> {
    await this.page.getByRole('group', { name: /^Which way does it work/ }).getByRole('radio', { name: new RegExp(`^${words}`) }).check()
  }

  /** What a break could do: the one question that has no answer beforehand. */
  async answerCouldHurt(answer: 'No' | 'Yes, or I am not sure'): Promise<void> {
    await this.page.getByRole('group', { name: /could it hurt someone/ }).getByRole('radio', { name: answer, exact: true }).check()
  }

  /** A row of the price ladder, once the server has worked it out. */
  priceRow(quantity: string): Locator { return this.view.getByRole('row', { name: new RegExp(`^${quantity} `) }) }
}

/** A spring that is quoted at once: guided in a bore and over a rod, in wire that lies in the rack. */
export const USUAL_SPRING = { firstForce: '60', firstLength: '50', secondForce: '150', secondLength: '35', bore: '24', rod: '14', quantity1: '50', quantity2: '200', quantity3: '500', quantity4: '', quantity5: '' } as const
