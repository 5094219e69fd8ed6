import { moneyWords, springsWords } from '../parts/words'
import { previewOrder } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef }) => `Confirm your address to go on with ${orderRef}`,
  props: ({ contactName, orderRef, title, quantity, grossMinor, depositMinor, currency }, { linkUrl }) => ({
    contactName, orderRef, title, linkUrl, springs: springsWords(quantity), gross: moneyWords(grossMinor, currency), deposit: moneyWords(depositMinor, currency),
  }),
  preview: { ...previewOrder, quantity: 500, grossMinor: 59_040, depositMinor: 23_616, currency: 'eur' },
  link: 'confirm-address',
})
