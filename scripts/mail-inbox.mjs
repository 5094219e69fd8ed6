// The mail inbox of the demo shop and of the tests: it takes every e-mail by SMTP and shows it on a page; nothing is sent on.
// Usage: MAIL_INBOX_SMTP_PORT=.. MAIL_INBOX_WEB_PORT=.. MAIL_INBOX_FOLDER=.. node scripts/mail-inbox.mjs
import { mkdirSync } from 'node:fs'
import { MailDev } from 'maildev'

const LOOPBACK = '127.0.0.1'
const MOST_MAILS_KEPT = 2_000

async function main() {
  const mailDirectory = process.env.MAIL_INBOX_FOLDER
  if (!mailDirectory) throw new Error('MAIL_INBOX_FOLDER is not set.')
  mkdirSync(mailDirectory, { recursive: true, mode: 0o700 })
  const inbox = new MailDev({
    smtp: readPort('MAIL_INBOX_SMTP_PORT'),
    ip: LOOPBACK,
    web: readPort('MAIL_INBOX_WEB_PORT'),
    webIp: LOOPBACK,
    mailDirectory,
    maxEmails: MOST_MAILS_KEPT,
    silent: true,
  })
  await inbox.start()
  for (const signal of ['SIGTERM', 'SIGINT']) {
    process.once(signal, () => {
      void inbox.stop().finally(() => process.exit(0))
    })
  }
}

/** @param {string} variable */
function readPort(variable) {
  const port = Number(process.env[variable])
  if (!Number.isInteger(port) || port < 1 || port > 65_535) throw new Error(`${variable}=${process.env[variable]} is not a port.`)
  return port
}

await main()
