import { defineMessage } from '../parts/message'
import { payloadSchema } from './payload'
import template from './template.vue'

export default defineMessage(payloadSchema, {
  template,
  subject: () => 'Your sign-in link',
  props: ({ name }, { linkUrl }) => ({ contactName: name, linkUrl }),
  preview: { name: 'Aoife Byrne' },
  link: 'sign-in',
})
