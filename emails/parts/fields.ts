import { z } from 'zod'
import { isCurrency } from '../../shared/money/index'

/** An absolute link on our own site, built from the configured origin, never from a header of the request. */
export const linkField = z.url({ protocol: /^https?$/ }).max(500)
export const currencyField = z.string().transform((code, context) => {
  if (isCurrency(code)) return code
  context.addIssue({ code: 'custom', message: 'not a currency we charge in' })
  return z.NEVER
})
/** Minor units of the currency beside it. */
export const amountField = z.int().min(0)
/** A calendar day, YYYY-MM-DD. */
export const dayField = z.iso.date()
/** A moment as ISO 8601 text with its zone. */
export const momentField = z.iso.datetime({ offset: true })

/** What every mail about an order says: whom it greets and which order it is about. */
export const aboutOrder = { contactName: z.string(), orderRef: z.string(), title: z.string() }

/** One rung of a quote: how many, for how much each (decimal text before tax), and the whole with tax. */
export const rungField = z.strictObject({ quantity: z.int().positive(), unitPrice: z.string(), grossMinor: amountField })
/** What a quote says in its mail. `springWords` names the spring in a line, such as "1.6 mm wire, 18 mm across, 60 mm long". */
export const quoteFields = {
  ...aboutOrder, quoteUrl: linkField, revision: z.string(), validUntil: dayField, currency: currencyField,
  springWords: z.string(), ladder: z.array(rungField).min(1), noteToCustomer: z.string().default(''),
}
