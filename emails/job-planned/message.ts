import { dayWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, leavesOn }) => `${orderRef} is planned and leaves us on ${dayWords(leavesOn)}`,
  props: ({ contactName, orderRef, title, leavesOn, orderUrl }) => ({ contactName, orderRef, title, orderUrl, leavesOn: dayWords(leavesOn) }),
  preview: { ...previewOrder, leavesOn: '2026-12-14', orderUrl: previewUrls.orderUrl },
})
