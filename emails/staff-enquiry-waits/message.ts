import { momentWords } from '../parts/words'
import { previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, firm, title }) => `${orderRef} waits for an estimator: ${firm}, ${title}`,
  props: ({ orderRef, title, firm, reasons, answerBy, estimatingUrl }, { timeZone }) => ({
    orderRef, title, firm, reasons, estimatingUrl, answerBy: answerBy === null ? '' : momentWords(answerBy, timeZone),
  }),
  preview: {
    orderRef: 'OX-2417', title: 'Return spring for a valve lever', firm: 'Byrne Valves', reasons: ['Says that a break could hurt someone.'], answerBy: '2026-12-11T17:00:00Z', estimatingUrl: previewUrls.estimatingUrl,
  },
})
