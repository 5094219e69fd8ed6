import { z } from 'zod'
import { replayMail } from '../../../../services/mail/replay'

export default defineRoute({ access: ['admin'], params: z.strictObject({ id: z.uuid() }) }, async ({ context, params }) => {
  await replayMail(context, params.id)
  outboxWorker.wake()
  return {}
})
