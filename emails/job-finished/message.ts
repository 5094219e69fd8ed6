import { moneyWords, springsWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, balanceMinor }) => balanceMinor > 0 ? `Your springs are finished: the balance for ${orderRef} is due` : `Your springs are finished (${orderRef})`,
  props: ({ contactName, orderRef, title, quantity, balanceMinor, currency, orderUrl }) => ({
    contactName, orderRef, title, orderUrl, springs: springsWords(quantity), balance: balanceMinor > 0 ? moneyWords(balanceMinor, currency) : '',
  }),
  preview: { ...previewOrder, quantity: 500, balanceMinor: 35_424, currency: 'eur', orderUrl: previewUrls.orderUrl },
})
