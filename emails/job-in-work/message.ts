import { dayWords, springsWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title }) => `Your springs are being made: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, quantity, leavesOn, orderUrl }) => ({ contactName, orderRef, title, orderUrl, springs: springsWords(quantity), leavesOn: leavesOn === null ? '' : dayWords(leavesOn) }),
  preview: { ...previewOrder, quantity: 500, leavesOn: '2026-12-14', orderUrl: previewUrls.orderUrl },
})
