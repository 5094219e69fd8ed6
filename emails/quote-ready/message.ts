import { dayWords, ladderRows } from '../parts/words'
import { previewQuote } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title }) => `Your quote: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, quoteUrl, revision, validUntil, currency, springWords, ladder, noteToCustomer }) => ({
    contactName, orderRef, title, quoteUrl, revision, springWords, noteToCustomer, validUntil: dayWords(validUntil), ladder: ladderRows(ladder, currency),
  }),
  preview: previewQuote,
})
