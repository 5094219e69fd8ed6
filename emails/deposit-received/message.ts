import { moneyWords, springsWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title }) => `Deposit received: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, quantity, amountMinor, balanceMinor, currency, orderUrl }) => ({
    contactName, orderUrl,
    facts: [
      { label: 'Order', value: `${orderRef}, ${title}` },
      { label: 'Quantity', value: springsWords(quantity) },
      { label: 'Received', value: moneyWords(amountMinor, currency) },
      { label: 'Left to pay', value: balanceMinor > 0 ? `${moneyWords(balanceMinor, currency)}, when the springs are finished` : 'Nothing' },
    ],
  }),
  preview: { ...previewOrder, quantity: 500, amountMinor: 23_616, balanceMinor: 35_424, currency: 'eur', orderUrl: previewUrls.orderUrl },
})
