import { createTransport } from 'nodemailer'
import { describe, expect, inject, it } from 'vitest'
import { useServices } from '../support/services'

const statusOf = (url: string): Promise<number | string> => fetch(url).then(response => response.status, (error: Error) => (error.cause as { code?: string }).code ?? error.message)
const health = `${inject('baseUrl')}/api/health`

describe('the services of a test run', () => {
  const services = useServices()

  it('lets a test kill the app and start it again', async () => {
    await services.app.kill()
    expect(await statusOf(health)).toBe('ECONNREFUSED')
    await services.app.start()
    expect(await statusOf(health)).toBe(200)
  })

  it('lets a test run a second app on the same database, with settings of its own', async () => {
    const second = `${inject('secondAppUrl')}/api/health`
    expect(await statusOf(second)).toBe('ECONNREFUSED')
    await services.secondApp.start({ NUXT_LIMITS: 'on' })
    expect(await statusOf(second)).toBe(200)
    await services.secondApp.stop()
    expect(await statusOf(second)).toBe('ECONNREFUSED')
  })

  it('lets a test close the mail inbox for a while; the mails are there again afterwards', async () => {
    const { hostname } = new URL(inject('mailUrl'))
    const subject = `kept over a restart ${Date.now()}`
    await createTransport({ host: hostname, port: inject('smtpPort'), secure: false, ignoreTLS: true }).sendMail({ from: 'a@oxmere.invalid', to: 'b@oxmere.invalid', subject, text: 'text' })
    const listSubjects = async (): Promise<string[]> => ((await (await fetch(`${inject('mailUrl')}/api/email`)).json()) as { subject: string }[]).map(mail => mail.subject)
    await expect.poll(listSubjects).toContain(subject)
    await services.mail.stop()
    expect(await statusOf(`${inject('mailUrl')}/api/healthz`)).toBe('ECONNREFUSED')
    await services.mail.start()
    await expect.poll(listSubjects).toContain(subject)
  })

  it('lets a test stop the Stripe fake', async () => {
    const url = `${inject('stripeFakeUrl')}/_fake/health`
    await services.stripeFake.stop()
    expect(await statusOf(url)).toBe('ECONNREFUSED')
    await services.stripeFake.start()
    expect(await statusOf(url)).toBe(200)
  })

  it.each(['stop', 'kill'] as const)('lets a test %s the database: the app says that it is not ready, lives on, and recovers by itself', async (way) => {
    await services.database[way]()
    expect(await statusOf(health)).toBe(503)
    await services.database.start()
    await expect.poll(() => statusOf(health), { timeout: 10_000 }).toBe(200)
  })

  it('takes orders only from the tests of this run', async () => {
    const response = await fetch(`${inject('controlUrl')}/app/kill`, { method: 'POST', headers: { authorization: 'Bearer guess' } })
    expect(response.status).toBe(401)
    expect(await statusOf(health)).toBe(200)
  })
})
