import { previewOrder, previewUrls } from '../parts/preview'
import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: ({ orderRef, title }) => `We have your enquiry: ${title} (${orderRef})`,
  props: ({ contactName, orderRef, title, quoteUrl }) => ({ contactName, orderRef, title, quoteUrl }),
  preview: { ...previewOrder, quoteUrl: previewUrls.quoteUrl },
})
