import { moneyWords, springsWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title }) => `On their way: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, quantity, balanceMinor, currency, orderUrl }) => ({
    contactName, orderRef, title, orderUrl, springs: springsWords(quantity), balance: balanceMinor > 0 ? moneyWords(balanceMinor, currency) : '',
  }),
  preview: { ...previewOrder, quantity: 500, balanceMinor: 0, currency: 'eur', orderUrl: previewUrls.orderUrl },
})
