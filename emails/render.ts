import { createSSRApp } from 'vue'
import { renderToString } from 'vue/server-renderer'
import { MAIL_MESSAGES } from './messages'
import type { MailMessage, SendTime } from './parts/message'
import { MAIL_PAYLOADS, type MailKind, type MailPayload } from './payloads'
import { toText } from './to-text'

export type RenderedMail = { subject: string, html: string, text: string }

const LONGEST_SUBJECT = 180
const escapeHtml = (text: string) => text.replace(/[&<>"]/g, sign => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[sign] ?? sign)
/** One line without control characters, of bounded length. */
function toSubject(text: string): string {
  const line = text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ').trim()
  return line.length > LONGEST_SUBJECT ? `${line.slice(0, LONGEST_SUBJECT - 1)}…` : line
}

/**
 * Renders a mail from its payload: subject, HTML with inline styles only, and the plain text of the same words.
 * @throws ZodError for a payload that is not the kind's
 */
export async function renderMail(kind: MailKind, payload: unknown, sendTime: SendTime): Promise<RenderedMail> {
  return renderMessage(messageOf(kind), MAIL_PAYLOADS[kind].parse(payload), sendTime)
}

/** Renders a kind with its invented example, for the preview in Works and for tests. */
export const renderPreview = (kind: MailKind, timeZone: string): Promise<RenderedMail> =>
  renderMessage(messageOf(kind), messageOf(kind).preview, { linkUrl: 'https://oxmere.example/link/preview', timeZone })

/** Which link a kind needs made when it is sent, if any. */
export const linkOf = (kind: MailKind): MailMessage<unknown>['link'] => MAIL_MESSAGES[kind].link

// The payload was parsed with the schema of the same kind, which the type of the table cannot say for a kind known only at run time.
const messageOf = (kind: MailKind) => MAIL_MESSAGES[kind] as MailMessage<MailPayload<MailKind>>

async function renderMessage(message: MailMessage<MailPayload<MailKind>>, payload: MailPayload<MailKind>, sendTime: SendTime): Promise<RenderedMail> {
  const subject = toSubject(message.subject(payload))
  const body = (await renderToString(createSSRApp(message.template, message.props(payload, sendTime)))).replace(/<!--.*?-->/gs, '')
  const html = `<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="color-scheme" content="light"><title>${escapeHtml(subject)}</title></head>
<body style="margin: 0; padding: 0; background-color: #F1F3EF">${body}</body></html>
`
  return { subject, html, text: toText(body) }
}
