import { dayWords, ladderRows } from '../parts/words'
import { previewQuote } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title, revision }) => `Your quote has changed, now revision ${revision}: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, quoteUrl, revision, validUntil, currency, springWords, ladder, noteToCustomer }) => ({
    contactName, orderRef, title, quoteUrl, revision, springWords, noteToCustomer, validUntil: dayWords(validUntil), ladder: ladderRows(ladder, currency),
  }),
  preview: { ...previewQuote, revision: 'B', noteToCustomer: 'We chose the next thicker wire, so that the spring lasts the strokes you named.' },
})
