import { expect, inject } from 'vitest'

export type ReceivedMail = { id: string, subject: string, messageId?: string, text: string, html: string, to: { address: string }[], from: { address: string }[], headers: Record<string, unknown> }

/** The mails that an address has received, oldest first. */
export async function mailsTo(address: string): Promise<ReceivedMail[]> {
  const response = await fetch(`${inject('mailUrl')}/api/email`)
  const mails = await response.json() as ReceivedMail[]
  return mails.filter(mail => mail.to.some(one => one.address === address))
}

/** The raw message as it came over SMTP. */
export const rawMail = async (id: string): Promise<string> => (await fetch(`${inject('mailUrl')}/api/email/${id}/source`)).text()

/** Waits for a mail whose subject fits and gives the newest. */
export async function waitForMail(address: string, subject: RegExp, timeout = 20_000): Promise<ReceivedMail> {
  const find = async () => (await mailsTo(address)).filter(mail => subject.test(mail.subject))
  await expect.poll(async () => (await find()).length, { timeout, interval: 200, message: `a mail to ${address} about ${subject}` }).toBeGreaterThan(0)
  return (await find()).at(-1)!
}

/** The secret of the link in a mail. */
export function linkTokenIn(mail: ReceivedMail): string {
  const token = /\/link\/([A-Za-z0-9_-]{43})/.exec(mail.text)?.[1]
  if (!token) throw new Error(`no link in the mail “${mail.subject}”`)
  return token
}
