import { dayWords } from '../parts/words'
import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, leavesOn }) => `New date for ${orderRef}: ${dayWords(leavesOn)}`,
  props: ({ contactName, orderRef, title, leavesOn, previouslyOn, orderUrl }) => ({ contactName, orderRef, title, orderUrl, leavesOn: dayWords(leavesOn), previouslyOn: dayWords(previouslyOn) }),
  preview: { ...previewOrder, leavesOn: '2026-12-16', previouslyOn: '2026-12-14', orderUrl: previewUrls.orderUrl },
})
