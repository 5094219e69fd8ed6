import { randomUUID } from 'node:crypto'
import fc from 'fast-check'
import { describe, expect, inject, it } from 'vitest'
import type { Problem } from '#shared/schemas/problem'
import { usualExtension, usualRequirement, usualTorsion } from './support/orders'
import { Visitor } from './support/visitor'

const contact = { name: 'Ilse Varrow', firm: 'Tarnbeck', email: 'ilse@bodies.example', countryCode: 'IE', title: 'Bottle filler', remarks: 'None.' }
const evaluate = { kind: 'compression', material: 'EN10270-1-SH', wireDiameterMm: 2.5, meanDiameterMm: 20, activeCoils: 8.25, freeLengthMm: 60, points: [{ lengthMm: 50 }, { lengthMm: 35 }] }
const size = { kind: 'compression', points: [{ lengthMm: 50, forceN: 60 }, { lengthMm: 35, forceN: 150 }], fit: { boreMm: 26 }, materials: ['EN10270-1-SH'], wireDiametersMm: [2, 2.5], objective: 'mass', limit: 2 }

const evaluateExtension = { kind: 'extension', material: 'EN10270-1-SH', wireDiameterMm: 1.6, meanDiameterMm: 14, bodyCoils: 20, initialTensionN: 10, hook: { form: 'full-loop', bendRadiusMm: 6 }, points: [{ forceN: 30 }] }
const evaluateTorsion = { kind: 'torsion', material: 'EN10270-1-SM', wireDiameterMm: 2, meanDiameterMm: 16, bodyCoils: 6, legs: [{ lengthMm: 20, form: 'tangential' }, { lengthMm: 30, form: 'straight' }], mandrelMm: 8, points: [{ angleDeg: 45 }, { momentNmm: 900 }] }
const sizeExtension = { kind: 'extension', points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 90, forceN: 60 }], hook: { form: 'half-loop' }, fit: { boreMm: 20 }, materials: ['EN10270-1-SH'], wireDiametersMm: [1.5, 1.6], objective: 'mass', limit: 2 }
const sizeTorsion = { kind: 'torsion', points: [{ angleDeg: 90, momentNmm: 500 }], legs: [{ lengthMm: 30, form: 'tangential' }, { lengthMm: 30, form: 'tangential' }], fit: { rodMm: 8 }, materials: ['EN10270-1-SH'], wireDiametersMm: [1.6, 2], objective: 'mass', limit: 2 }

/** Every public route that takes a body, with one that is right; those that take a spring, with one of each kind. */
const ROUTES: Readonly<Record<string, Record<string, unknown>>> = {
  '/api/order/preview': { requirement: usualRequirement },
  '/api/order/preview extension': { requirement: usualExtension },
  '/api/order/preview torsion': { requirement: usualTorsion },
  '/api/enquiries': { requirement: usualRequirement, contact },
  '/api/enquiries extension': { requirement: usualExtension, contact },
  '/api/enquiries torsion': { requirement: usualTorsion, contact },
  '/api/quotes/OX-1/accept': { quantity: 100, version: 1, key: 'x'.repeat(43) },
  '/api/quotes/OX-1/decline': { version: 1, reason: 'No.', key: 'x'.repeat(43) },
  '/api/quotes/OX-1/confirm-link': { key: 'x'.repeat(43) },
  '/api/auth/login': { email: 'nobody@bodies.example', password: 'wrong words here' },
  '/api/auth/link': { email: 'nobody@bodies.example' },
  '/api/auth/use-link': { token: 'x'.repeat(43) },
  '/api/v1/springs/evaluate': evaluate,
  '/api/v1/springs/evaluate extension': evaluateExtension,
  '/api/v1/springs/evaluate torsion': evaluateTorsion,
  '/api/v1/springs/size': size,
  '/api/v1/springs/size extension': sizeExtension,
  '/api/v1/springs/size torsion': sizeTorsion,
}
const RUNS = 2_000
const SEED = 20_261_201

const NASTY = fc.oneof(
  fc.constantFrom<unknown>(null, '', ' ', -1, 0, -0, 1e308, 1e21, Number.MAX_SAFE_INTEGER, 1.5, true, [], {}, ['a'], 'NaN', '1e309', '12 mm', '<script>alert(1)</script>', '\u0000', '\ud800', '../../etc', "'; drop table orders; --", 'a'.repeat(5_000), '9999-12-31', '2026-02-30', { $gt: 0 }, [[[[]]]], { toString: 1 }),
  fc.jsonValue({ maxDepth: 3 }),
)
type Json = Record<string, unknown>
const paths = (value: unknown, at: (string | number)[] = []): (string | number)[][] => typeof value === 'object' && value !== null
  ? Object.entries(value).flatMap(([key, child]) => [[...at, key], ...paths(child, [...at, key])])
  : []
function withValue(body: Json, path: (string | number)[], value: unknown): Json {
  const copy = structuredClone(body)
  let parent: Json = copy
  for (const key of path.slice(0, -1)) parent = parent[key] as Json
  if (value === undefined) Reflect.deleteProperty(parent, path.at(-1)!)
  else parent[path.at(-1)!] = value
  return copy
}
/** A body that is right but for one to three places, or no body of ours at all. */
const bodiesLike = (valid: Json) => fc.oneof(
  { weight: 6, arbitrary: fc.array(fc.tuple(fc.constantFrom(...paths(valid)), fc.option(NASTY, { nil: undefined })), { minLength: 1, maxLength: 3 }).map(changes => changes.reduce((body, [path, value]) => {
    try {
      return withValue(body, path, value)
    }
    catch {
      return body
    }
  }, valid)) },
  { weight: 1, arbitrary: fc.jsonValue({ maxDepth: 3 }) },
  { weight: 1, arbitrary: fc.dictionary(fc.string({ maxLength: 12 }), NASTY, { maxKeys: 6 }).map(extra => ({ ...valid, ...extra })) },
)

async function send(path: string, body: unknown): Promise<{ status: number, type: string, text: string }> {
  const answer = await fetch(`${inject('baseUrl')}${path}`, { method: 'POST', body: JSON.stringify(body), headers: { 'content-type': 'application/json', 'idempotency-key': randomUUID() } })
  return { status: answer.status, type: answer.headers.get('content-type') ?? '', text: await answer.text() }
}

describe.each(Object.keys(ROUTES))('%s', (path) => {
  it(`answers ${RUNS} random bodies without a fault of its own (S-9, S-10, S-11)`, async () => {
    const bodies = fc.sample(bodiesLike(ROUTES[path]!), { numRuns: RUNS, seed: SEED })
    const faults: unknown[] = []
    let next = 0
    await Promise.all(Array.from({ length: 8 }, async () => {
      while (next < bodies.length) {
        const body = bodies[next++]
        const { status, type, text } = await send(path.split(' ')[0]!, body)
        const isRefused = status >= 400
        if (status >= 500 || (isRefused && !type.startsWith('application/problem+json'))) faults.push({ status, type, body, text: text.slice(0, 200) })
      }
    }))
    expect(faults.slice(0, 3), `seed ${SEED}`).toEqual([])
  }, 400_000)
})

/** The same body with some of its numbers many times larger or smaller: most are well formed, and few springs can be made. */
function otherNumbers(valid: Json): fc.Arbitrary<Json> {
  const numbers = paths(valid).filter(path => typeof path.reduce<unknown>((value, key) => (value as Json)[key], valid) === 'number' && !path.includes('quantities') && path.at(-1) !== 'limit')
  return fc.array(fc.tuple(fc.constantFrom(...numbers), fc.integer({ min: -15, max: 15 })), { minLength: 1, maxLength: 4 }).map(changes => changes.reduce(
    (body, [path, power]) => withValue(body, path, Number((path.reduce<unknown>((value, key) => (value as Json)[key], body) as number * 10 ** (power / 10)).toPrecision(4))), valid,
  ))
}

describe.each(Object.entries(ROUTES).filter(([path]) => /preview|springs/.test(path)))('%s', (path, valid) => {
  it('answers springs of quite other sizes, each within the patience of a person', async () => {
    const slow: unknown[] = []
    const statuses = new Set<number>()
    for (const body of fc.sample(otherNumbers(valid), { numRuns: path.includes('preview') ? 60 : 200, seed: SEED })) {
      const from = performance.now()
      const { status, text } = await send(path.split(' ')[0]!, body)
      const ms = performance.now() - from
      statuses.add(status)
      if (ms > 15_000 || ![200, 422].includes(status)) slow.push({ ms, status, body: JSON.stringify(body), text: text.slice(0, 200) })
    }
    expect(slow, `seed ${SEED}`).toEqual([])
    expect(statuses).toContain(200)
  }, 400_000)
})

describe('the order form', () => {
  const enquire = async (requirement: object, who: object = contact) => {
    const { status, body } = await new Visitor().post<Problem>('/api/enquiries', { requirement, contact: who }, { 'idempotency-key': randomUUID() })
    return { status, paths: (body.errors ?? []).map(error => error.path) }
  }
  const need = usualRequirement.need
  const cases: readonly [string, object, object, string][] = [
    ['an empty load', { ...usualRequirement, need: { ...need, first: { lengthMm: 50 } } }, contact, 'requirement.need.first.forceN'],
    ['a load of nought', { ...usualRequirement, need: { ...need, first: { forceN: 0, lengthMm: 50 } } }, contact, 'requirement.need.first.forceN'],
    ['a negative length', { ...usualRequirement, need: { ...need, first: { forceN: 60, lengthMm: -50 } } }, contact, 'requirement.need.first.lengthMm'],
    ['a load that is no number', { ...usualRequirement, need: { ...need, first: { forceN: null, lengthMm: 50 } } }, contact, 'requirement.need.first.forceN'],
    ['a load with its unit as text', { ...usualRequirement, need: { ...need, first: { forceN: '60 lbf', lengthMm: 50 } } }, contact, 'requirement.need.first.forceN'],
    ['a load beyond all sense', { ...usualRequirement, need: { ...need, first: { forceN: 1e300, lengthMm: 50 } } }, contact, 'requirement.need.first.forceN'],
    ['lengths in the wrong order', { ...usualRequirement, need: { ...need, second: { forceN: 150, lengthMm: 55 } } }, contact, 'requirement.need.second.lengthMm'],
    ['a bore smaller than the rod', { ...usualRequirement, boreMm: 10, rodMm: 17 }, contact, 'requirement.boreMm'],
    ['a length beyond the free length', { ...usualRequirement, need: { knows: 'rate-and-length', rateNPerMm: 2, freeLengthMm: 40, shortestLengthMm: 60 } }, contact, 'requirement.need.shortestLengthMm'],
    ['a longest length under the first length', { ...usualRequirement, maxFreeLengthMm: 45 }, contact, 'requirement.maxFreeLengthMm'],
    ['no quantity', { ...usualRequirement, quantities: [] }, contact, 'requirement.quantities'],
    ['half a spring', { ...usualRequirement, quantities: [10.5] }, contact, 'requirement.quantities.0'],
    ['seven quantities', { ...usualRequirement, quantities: [1, 2, 3, 4, 5, 6, 7] }, contact, 'requirement.quantities'],
    ['a day that does not exist', { ...usualRequirement, neededOn: '2026-02-30' }, contact, 'requirement.neededOn'],
    ['no answer about harm', { ...usualRequirement, couldHurt: '' }, contact, 'requirement.couldHurt'],
    ['an empty name', usualRequirement, { ...contact, name: ' ' }, 'contact.name'],
    ['an over-long name', usualRequirement, { ...contact, name: 'x'.repeat(121) }, 'contact.name'],
    ['two addresses in one', usualRequirement, { ...contact, email: 'a@x.example, b@y.example' }, 'contact.email'],
    ['line ends in the firm (MAIL-10)', usualRequirement, { ...contact, firm: 'Tarnbeck\r\nBcc: b@y.example' }, 'contact.firm'],
    ['a country that is not on the list', usualRequirement, { ...contact, countryCode: 'XX' }, 'contact.countryCode'],
    ['over-long remarks', usualRequirement, { ...contact, remarks: 'x'.repeat(4_001) }, 'contact.remarks'],
  ]
  it.each(cases)('refuses %s beside its field', async (_, requirement, who, path) => {
    const answer = await enquire(requirement, who)
    expect(answer.status).toBe(422)
    expect(answer.paths).toContain(path)
  })
  it('keeps script text as text', async () => {
    const visitor = new Visitor()
    const title = '<img src=x onerror=alert(1)>'
    const { status, body } = await visitor.post<{ ref: string, key: string }>('/api/enquiries', { requirement: usualRequirement, contact: { ...contact, title } }, { 'idempotency-key': randomUUID() })
    expect(status).toBe(201)
    const page = await fetch(`${inject('baseUrl')}/quotes/${body.ref}?key=${body.key}`)
    expect(await page.text()).not.toContain(title)
  })
})
