import { spawn } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { startStripeFake } from '../../fakes/stripe/index'
import { createStripeFakeControl } from '../../fakes/stripe/control-client'
import { createSdk, HOOK_SECRET, sessionParams, startReceiver } from './set-up'

const MAIN = fileURLToPath(new URL('../../fakes/stripe/main.ts', import.meta.url))

let folder: string
let children: ChildProcess[] = []
beforeEach(() => { folder = mkdtempSync(join(tmpdir(), 'stripe-fake-')) })
afterEach(() => {
  for (const child of children) child.kill('SIGKILL')
  children = []
  rmSync(folder, { recursive: true, force: true })
})

interface Started { child: ChildProcess, url: string, ended: Promise<number | null>, errors: () => string }

/** Runs the fake as a process; answers once it listens or has ended. */
async function run(environment: Record<string, string>): Promise<Started> {
  const child = spawn(process.execPath, ['--import', 'tsx', MAIN], { env: { PATH: process.env.PATH, ...environment }, stdio: ['ignore', 'pipe', 'pipe'] })
  children.push(child)
  let [output, errors] = ['', '']
  child.stderr?.on('data', (chunk: Buffer) => { errors += chunk.toString() })
  const ended = new Promise<number | null>(resolve => child.once('exit', code => resolve(code)))
  const listening = new Promise<void>((resolve) => {
    child.stdout?.on('data', (chunk: Buffer) => {
      output += chunk.toString()
      if (output.includes('\n')) resolve()
    })
  })
  await Promise.race([listening, ended])
  return { child, url: /http:\S+/.exec(output)?.[0] ?? '', ended, errors: () => errors }
}

function sdkFor(url: string) {
  const { hostname, port } = new URL(url)
  return createSdk({ host: hostname, port: Number(port), secretKey: 'sk_test_wirewright_fake' })
}

describe('FK-8 the fake refuses to stand in for the real thing', () => {
  it.each([
    ['in production', { NODE_ENV: 'production' }, /does not start with NODE_ENV=production/],
    ['on another address', { STRIPE_FAKE_HOST: '0.0.0.0' }, /127\.0\.0\.1 only/],
    ['with a live key', { STRIPE_FAKE_SECRET_KEY: 'sk_live_something' }, /begins with sk_test_/],
    ['for a receiver elsewhere', { STRIPE_FAKE_WEBHOOK_URL: 'https://shop.example.com/hook' }, /this machine only/],
    ['with an empty secret', { STRIPE_FAKE_WEBHOOK_SECRET: ' ' }, /must not be empty/],
    ['on a port that is none', { STRIPE_FAKE_PORT: 'eighty' }, /must be a port number/],
  ])('does not start %s', { timeout: 20_000 }, async (_name, environment, message) => {
    const { ended, errors, url } = await run(environment as Record<string, string>)
    expect([await ended, url]).toEqual([1, ''])
    expect(errors()).toMatch(message)
  })
})

describe('the state file', () => {
  it('brings back sessions, keys and undelivered events after the process was killed', { timeout: 30_000 }, async () => {
    const receiver = await startReceiver()
    receiver.answerWith(503)
    const stateFile = join(folder, 'kept', 'state.json')
    const environment = { STRIPE_FAKE_STATE_FILE: stateFile, STRIPE_FAKE_WEBHOOK_URL: receiver.url, STRIPE_FAKE_WEBHOOK_SECRET: HOOK_SECRET }
    const first = await run(environment)
    const made = await sdkFor(first.url).checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-1' })
    await createStripeFakeControl({ url: first.url, secretKey: 'sk_test_wirewright_fake' }).setOutcome(made.id, 'paid')
    first.child.kill('SIGKILL')
    await first.ended

    receiver.answerWith(200)
    receiver.received.length = 0
    const second = await run(environment)
    const stripe = sdkFor(second.url)
    expect(await stripe.checkout.sessions.retrieve(made.id)).toMatchObject({ status: 'complete', payment_status: 'paid' })
    expect((await stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-1' })).id).toBe(made.id)
    await receiver.waitFor(4, 8000)
    const types = receiver.received.map(hook => stripe.webhooks.constructEvent(hook.body, hook.signature, HOOK_SECRET).type)
    expect(types).toContain('checkout.session.completed')
    second.child.kill('SIGTERM')
    expect(await second.ended).toBe(0)
    expect(readdirSync(join(folder, 'kept'))).toEqual(['state.json'])
    await receiver.close()
  })

  it('is refused with advice when it is not one, and left as it was', async () => {
    const stateFile = join(folder, 'state.json')
    for (const content of ['{"half":', '{"format":2}']) {
      writeFileSync(stateFile, content)
      await expect(startStripeFake({ stateFile })).rejects.toThrow(/Move .* away to start afresh/)
      expect(readFileSync(stateFile, 'utf8')).toBe(content)
    }
  })

  it('gives open sessions the address of the new start', async () => {
    const stateFile = join(folder, 'state.json')
    const first = await startStripeFake({ stateFile })
    const { id } = await createSdk(first).checkout.sessions.create(sessionParams())
    await first.close()
    const second = await startStripeFake({ stateFile })
    expect((await createSdk(second).checkout.sessions.retrieve(id)).url).toBe(`${second.url}/c/pay/${id}`)
    await second.close()
  })
})
