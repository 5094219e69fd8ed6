import { expect, inject, it } from 'vitest'
import type { Problem } from '#shared/schemas/problem'
import type { SizeResponse } from '#shared/schemas/spring'
import { useServices } from './support/services'
import { Visitor, type Answer } from './support/visitor'

const services = useServices()
const visitor = new Visitor()
const wait = (ms: number) => new Promise(resolve => setTimeout(resolve, ms))

/** Each asks something else, and finding out what clashes takes a while. */
const impossible = (i: number) => ({ kind: 'compression', points: [{ lengthMm: 40, forceN: 50 + i / 100 }, { lengthMm: 30, forceN: 100 }], fit: { boreMm: 14, rodMm: 12 }, objective: 'mass' })
const size = (i: number): Promise<Answer<SizeResponse | Problem>> => visitor.post('/api/v1/springs/size', impossible(i))

async function healthMs(): Promise<number> {
  const start = performance.now()
  expect((await visitor.get('/api/health')).status).toBe(200)
  return performance.now() - start
}
const middleOf = (times: number[]) => times.sort((a, b) => a - b)[Math.floor(times.length / 2)] ?? Number.NaN

it('sizes beside the server: others are answered quickly meanwhile, and what is too much is refused for a moment', async () => {
  await size(0)
  const idle: number[] = []
  for (let i = 0; i < 20; i++) idle.push(await healthMs())
  const asked = Array.from({ length: 150 }, (_, i) => size(i + 1))
  const busy: number[] = []
  let isDone = false
  const answering = Promise.all(asked).then((answers) => {
    isDone = true
    return answers
  })
  while (!isDone) {
    busy.push(await healthMs())
    await wait(5)
  }
  const answers = await answering
  const done = answers.filter(({ status }) => status === 200)
  const refused = answers.filter(({ status }) => status === 503)
  console.log(`150 at once: ${done.length} answered, ${refused.length} refused; health ${middleOf(idle).toFixed(1)} ms before, ${middleOf(busy).toFixed(1)} ms meanwhile (${busy.length} times)`)
  expect(done.length + refused.length).toBe(150)
  expect(done.length).toBeGreaterThanOrEqual(50)
  expect(refused.length).toBeGreaterThan(0)
  for (const { body } of done) expect((body as SizeResponse).conflict?.requirements).toEqual(['fit.boreMm', 'fit.rodMm'])
  for (const { headers, body } of refused) {
    expect(Number(headers.get('retry-after'))).toBeGreaterThan(0)
    expect(headers.get('content-type')).toContain('application/problem+json')
    expect((body as Problem).detail).toMatch(/Try again/)
  }
  // Three cores' work on two: the page may wait its turn, but never for a whole search.
  expect(middleOf(busy)).toBeLessThan(middleOf(idle) + 100)
  expect((await size(999)).status).toBe(200)
}, 120_000)

it('ends its threads with the server, also with work in hand', async () => {
  const asked = Array.from({ length: 20 }, (_, i) => size(2000 + i).then(({ status }) => status, () => 'closed'))
  await wait(50)
  const start = performance.now()
  await services.app.stop()
  expect(performance.now() - start).toBeLessThan(12_000)
  // Each was answered, refused, or lost its connection: nobody waits for ever.
  for (const outcome of await Promise.all(asked)) expect([200, 503, 'closed']).toContain(outcome)
  await services.app.start()
  expect((await new Visitor(inject('baseUrl')).post('/api/v1/springs/size', impossible(0))).status).toBe(200)
}, 120_000)
