import { expect } from '@playwright/test'

/** An e-mail as the inbox keeps it, with the fields that the tests read. */
export type Mail = { id: string, subject: string, text: string, html: string, to: { address: string }[], time: string }

/** The inbox of the run, read as a program would: by its API. */
export class Mailbox {
  constructor(private readonly url: string) {}

  /** Mails to one address, oldest first. */
  async list(recipient: string): Promise<Mail[]> {
    const response = await fetch(`${this.url}/api/email`)
    const all = await response.json() as Mail[]
    return all.filter(mail => mail.to.some(({ address }) => address === recipient)).sort((a, b) => a.time.localeCompare(b.time))
  }

  /** Waits until exactly `count` mails with such a subject have come to the address, and gives the newest. */
  async waitFor(recipient: string, subject: RegExp, { count = 1 }: { count?: number } = {}): Promise<Mail> {
    const matching = async () => (await this.list(recipient)).filter(mail => subject.test(mail.subject))
    await expect.poll(async () => (await matching()).length, { message: `mails like ${subject} to ${recipient}`, timeout: 20_000 }).toBe(count)
    return (await matching()).at(-1)!
  }

  /** Subjects of what an address has got, oldest first: to see that nothing came twice. */
  async subjects(recipient: string): Promise<string[]> {
    return (await this.list(recipient)).map(mail => mail.subject)
  }
}

/** The address of the first link in a mail's text whose path begins so. The text must hold it: a person may see no HTML. */
export function linkIn(mail: Mail, path: string): string {
  const urls = mail.text.match(/https?:\/\/[^\s<>"]+/g) ?? []
  const found = urls.find(url => new URL(url).pathname.startsWith(path))
  if (!found) throw new Error(`No link to ${path} in “${mail.subject}”. Links: ${urls.join(', ')}`)
  return found
}
