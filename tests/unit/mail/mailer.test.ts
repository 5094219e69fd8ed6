import { createServer, type Server } from 'node:net'
import type { AddressInfo } from 'node:net'
import { afterEach, describe, expect, it } from 'vitest'
import { buildMessage, createMailer, MailFailure } from '../../../server/integrations/mailer'
import { mailDelayS } from '../../../server/services/mail/work'
import { redactLinks } from '../../../server/services/mail/redact'
import { maskAddress } from '../../../server/services/mail/list'

const addresses = { from: 'Oxmere Spring Works <orders@oxmere.invalid>', replyTo: '' }
const mail = { id: '0b7f3c1e-6a54-4d6e-9d1b-3f0f6a1c2b4d', recipient: 'aoife@byrne.example', subject: 'Größe Ø 18 mm — über 500 Stück', html: `<p>${'long '.repeat(400)}</p>`, text: 'Hello' }

let server: Server | undefined
afterEach(() => server?.close())

/** A mail server that answers each command with what the script says, and keeps what it was sent. */
async function startServer(script: Partial<Record<'greeting' | 'MAIL' | 'RCPT' | 'DATA' | 'END', string>>): Promise<{ port: number, received: () => string }> {
  let received = ''
  server = createServer((socket) => {
    let isData = false
    socket.on('error', () => undefined)
    socket.write(`${script.greeting ?? '220 ready'}\r\n`)
    socket.on('data', (chunk) => {
      const text = chunk.toString('utf8')
      if (isData) {
        received += text
        if (!received.includes('\r\n.\r\n')) return
        isData = false
        socket.write(`${script.END ?? '250 taken'}\r\n`)
        return
      }
      for (const line of text.split('\r\n').filter(Boolean)) {
        const verb = line.slice(0, 4).toUpperCase()
        if (verb === 'EHLO') socket.write('250 hello\r\n')
        else if (verb === 'MAIL' || verb === 'RCPT') {
          received += `${line}\n`
          socket.write(`${script[verb] ?? '250 fine'}\r\n`)
        }
        else if (verb === 'DATA') {
          isData = !script.DATA
          socket.write(`${script.DATA ?? '354 go on'}\r\n`)
        }
        else socket.end('221 bye\r\n')
      }
    })
  })
  await new Promise<void>(resolve => server!.listen(0, '127.0.0.1', resolve))
  return { port: (server.address() as AddressInfo).port, received: () => received }
}
const mailerTo = (port: number) => createMailer({ host: '127.0.0.1', port, secure: false, user: '', password: '', requiresTls: false }, addresses)
const failureOf = async (port: number): Promise<string> => mailerTo(port).send(mail).then(() => 'sent', (error: unknown) => error instanceof MailFailure ? error.kind : 'another error')

describe('the message as it goes out', () => {
  it('has exactly one of each header, text before HTML, short lines, and an id that stays the same (MAIL-2, MAIL-6, MAIL-7)', async () => {
    const { port, received } = await startServer({})
    await mailerTo(port).send(mail)
    const raw = received()
    const head = raw.slice(0, raw.indexOf('\r\n\r\n'))
    for (const name of ['From', 'To', 'Date', 'Message-ID', 'Subject', 'Reply-To', 'Auto-Submitted', 'MIME-Version']) expect([name, head.match(new RegExp(`^${name}: `, 'gim'))?.length]).toEqual([name, 1])
    expect(head).toContain('Message-ID: <0b7f3c1e-6a54-4d6e-9d1b-3f0f6a1c2b4d@oxmere.invalid>')
    expect(head).toContain('Auto-Submitted: auto-generated')
    expect(head).toMatch(/^Reply-To: orders@oxmere\.invalid/m)
    expect(head).toMatch(/^Content-Type: multipart\/alternative/m)
    expect(raw.indexOf('Content-Type: text/plain; charset=utf-8')).toBeLessThan(raw.indexOf('Content-Type: text/html; charset=utf-8'))
    expect(raw.indexOf('Content-Type: text/plain')).toBeGreaterThan(0)
    expect(Math.max(...raw.split('\r\n').map(line => Buffer.byteLength(line)))).toBeLessThanOrEqual(998)
  })

  it('goes to one recipient, even when the address looks like two (MAIL-10)', async () => {
    const { port, received } = await startServer({})
    await mailerTo(port).send({ ...mail, recipient: 'a@x.example, b@y.example' }).catch(() => undefined)
    expect(received().match(/^RCPT TO/gm)?.length ?? 0).toBeLessThanOrEqual(1)
    expect(received()).not.toMatch(/RCPT TO:<b@y\.example>/)
    expect(buildMessage(mail, addresses).to).toEqual({ name: '', address: 'aoife@byrne.example' })
  })

  it('takes nothing from files or addresses (MAIL-11)', () => {
    expect(buildMessage(mail, addresses)).toMatchObject({ disableFileAccess: true, disableUrlAccess: true })
  })
})

describe('what the mail server says', () => {
  it.each([
    [{ RCPT: '550 5.1.1 no such user' }, 'refused'], [{ MAIL: '553 5.1.8 not from you' }, 'refused'], [{ END: '554 5.7.1 spam' }, 'refused'],
    [{ RCPT: '450 4.2.1 later' }, 'delayed'], [{ RCPT: '451 4.7.1 greylisted' }, 'delayed'], [{ END: '452 4.3.1 no room' }, 'delayed'],
    [{ greeting: '554 5.3.2 closed today' }, 'unreachable'], [{ greeting: '421 4.3.2 going down' }, 'unreachable'],
  ])('%j means that the mail is %s (MAIL-4)', async (script, kind) => {
    const { port } = await startServer(script)
    expect(await failureOf(port)).toBe(kind)
  })

  it('nothing at all means that every mail waits', async () => {
    const { port } = await startServer({})
    await new Promise(resolve => server!.close(resolve))
    expect(await failureOf(port)).toBe('unreachable')
  })

  it('without encryption is not taken where encryption is required (MAIL-8, S-51)', async () => {
    const { port, received } = await startServer({})
    const mailer = createMailer({ host: '127.0.0.1', port, secure: false, user: '', password: '', requiresTls: true }, addresses)
    await expect(mailer.send(mail)).rejects.toThrow(MailFailure)
    expect(received()).toBe('')
  })
})

describe('waiting between tries', () => {
  it('grows from seconds to five minutes, spread by chance, and covers two days (MAIL-3)', () => {
    expect(mailDelayS(1, 0.5)).toBe(2)
    expect(mailDelayS(4, 0.5)).toBe(16)
    expect(mailDelayS(1_000, 0.5)).toBe(300)
    expect([mailDelayS(3, 0), mailDelayS(3, 1)]).toEqual([6, 10])
  })
})

describe('what is kept and shown', () => {
  it('has no secret of a link left, at any depth', () => {
    expect(redactLinks({ a: 'https://x.example/quotes/OX-1?key=abc_DEF-123&b=1', b: ['https://x.example/link/SECRETsecret'], c: 3, d: null }))
      .toEqual({ a: 'https://x.example/quotes/OX-1?key=…&b=1', b: ['https://x.example/link/…'], c: 3, d: null })
  })

  it('has no whole address', () => {
    expect(maskAddress('aoife@byrne.example')).toBe('a…@byrne.example')
  })
})
