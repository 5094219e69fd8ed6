import { momentWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title }) => `One of us is looking at your enquiry: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, quoteUrl, reasons, answerBy }, { timeZone }) => ({
    contactName, orderRef, title, quoteUrl, reasons, answerBy: answerBy === null ? '' : momentWords(answerBy, timeZone),
  }),
  preview: { ...previewOrder, quoteUrl: previewUrls.quoteUrl, reasons: ['A break could hurt someone, so an engineer looks at it before we quote.'], answerBy: '2026-12-11T17:00:00Z' },
})
