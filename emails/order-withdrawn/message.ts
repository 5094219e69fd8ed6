import { previewOrder } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title }) => `Withdrawn: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, withdrawnBy, reason }) => ({ contactName, orderRef, title, isByCustomer: withdrawnBy === 'customer', reason }),
  preview: { ...previewOrder, withdrawnBy: 'works', reason: 'This alloy is no longer drawn in the diameter you need.' },
})
