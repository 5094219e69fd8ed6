import { moneyWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, paymentKind }) => `The ${paymentKind} for ${orderRef} did not go through`,
  props: ({ contactName, orderRef, title, paymentKind, amountMinor, currency, orderUrl }) => ({ contactName, orderRef, title, paymentKind, orderUrl, amount: moneyWords(amountMinor, currency) }),
  preview: { ...previewOrder, paymentKind: 'deposit', amountMinor: 23_616, currency: 'eur', orderUrl: previewUrls.orderUrl },
})
