import { z } from 'zod'
import type { MailPreview } from '#shared/schemas/mail'
import { MAIL_PAYLOADS, type MailKind } from '../../../../../emails/payloads'
import { renderPreview } from '../../../../../emails/render'

const kindSchema = z.enum(Object.keys(MAIL_PAYLOADS) as [MailKind, ...MailKind[]])

export default defineRoute({ access: ['admin'], params: z.strictObject({ kind: kindSchema }) }, async ({ params }): Promise<MailPreview> =>
  ({ kind: params.kind, ...await renderPreview(params.kind, useSettings().shopTimeZone) }))
