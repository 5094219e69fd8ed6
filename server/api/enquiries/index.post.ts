import { enquiryRequestSchema } from '#shared/schemas/enquiry'
import { createEnquiry } from '../../services/enquiries/create'
import { takeFromLimit } from '../../services/limits/take'

/** Per address of the recipient, so that nobody can have us write to somebody else over and over. */
const PER_RECIPIENT = { name: 'enquiry-recipient', max: 10, windowS: 3600 }

export default defineRoute(
  { access: 'public', body: enquiryRequestSchema, status: 201, limit: { name: 'enquiry', max: 30, windowS: 3600 } },
  async ({ event, context, body }) => {
    const clientKey = readClientKey(event)
    if (useSettings().limits === 'on') await takeFromLimit(context.db, PER_RECIPIENT, body.contact.email)
    return createEnquiry(context, { request: body, clientKey })
  },
)
