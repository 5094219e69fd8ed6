import { beforeAll, describe, expect, it } from 'vitest'
import type { RequirementInput } from '#shared/schemas/enquiry'
import type { JobCostView } from '#shared/schemas/ledger'
import type { EstimatingView, PreviewView, QuoteView, StoredDesign } from '#shared/schemas/quote'
import type { BenchView, JobSheetView } from '#shared/schemas/shop'
import { evaluateSpring } from '#shared/spring/mechanics/evaluate-spring'
import { query } from './support/database'
import { waitForMail } from './support/mailbox'
import { newAddress, orderView, placeEnquiry, sessionIdOf, usualExtension, usualRequirement, usualTorsion } from './support/orders'
import { paidJob } from './support/paid-job'
import { makeJob } from './support/shop-floor'
import { endSession } from './support/stripe'
import { signInAsRole, Visitor } from './support/visitor'

let [supervisor, operator, estimator, bookkeeper]: Visitor[] = []
beforeAll(async () => {
  [supervisor, operator, estimator, bookkeeper] = await Promise.all(['supervisor', 'operator', 'estimator', 'bookkeeper'].map(role => signInAsRole(role)))
})

const quoteOf = async (visitor: Visitor, { ref, key }: { ref: string, key: string }) => (await visitor.get<QuoteView>(`/api/quotes/${ref}?key=${key}`)).body
const stops = (design: StoredDesign) => design.evaluation.checks.filter(check => !check.ok && check.severity === 'stop')
const preview = (requirement: object) => new Visitor().post<PreviewView>('/api/order/preview', { requirement })

/** What each kind is quoted, made and told with. */
const KINDS = [
  { kind: 'compression', requirement: usualRequirement, steps: ['coiling', 'stress-relief', 'end-grinding', 'inspection', 'packing'], formed: /^\d+ pieces, /, words: /mm long$/, note: /Do not use it solid/, caution: /A pressed spring stores energy/ },
  { kind: 'extension', requirement: usualExtension, steps: ['coiling', 'stress-relief', 'inspection', 'packing'], formed: /pieces with 2 full loops each/, words: /mm long inside its hooks$/, note: /nothing in the spring stops it, so give it a stop/, caution: /flies when a hook slips/ },
  { kind: 'torsion', requirement: usualTorsion, steps: ['coiling', 'stress-relief', 'inspection', 'packing'], formed: /pieces with 2 legs off the coil each/, words: /mm long in the body$/, note: /It clears a rod of 8 mm/, caution: /whips back when a leg slips/ },
] as const

describe.each(KINDS)('a $kind spring', ({ kind, requirement, steps, formed, words, note, caution }) => {
  it('is sized and priced as one types, and does what is asked for', async () => {
    const { status, body } = await preview(requirement)
    expect([status, body.design?.kind, body.conflict, body.waitsForPerson]).toEqual([200, kind, null, []])
    const design = body.design!
    expect(stops(design)).toEqual([])
    const { need } = requirement
    expect(body.points).toEqual([need.first, need.second])
    const asked = [need.first, need.second].map(point => 'momentNmm' in point ? point.momentNmm : point.forceN)
    // Within the 1 % that coil and diameter steps may cost.
    const got = design.evaluation.kind === 'torsion' ? design.evaluation.points.map(point => point.momentNmm) : design.evaluation.points.map(point => point.forceN)
    for (const [at, value] of got.entries()) expect(Math.abs(value / asked[at]! - 1), `${kind} ${at}`).toBeLessThan(0.011)
    // The spring that is kept is the spring that was judged.
    const again = evaluateSpring(design.spring)
    expect([again.massG, again.wireLengthMm, again.points, again.tolerances]).toEqual([design.evaluation.massG, design.evaluation.wireLengthMm, design.evaluation.points, design.evaluation.tolerances])
    expect(body.ladder.map(rung => rung.quantity)).toEqual([100, 500])
    for (const rung of body.ladder) {
      expect(rung.netMinor + rung.taxMinor).toBe(rung.grossMinor)
      expect(rung.dispatchOn).toMatch(/^\d{4}-\d\d-\d\d$/)
    }
    expect(Number(body.ladder[0]!.unitPrice)).toBeGreaterThan(Number(body.ladder[1]!.unitPrice))
  })

  it('is quoted at once, with a line of the mail and the notes that are its own', async () => {
    const visitor = new Visitor()
    const email = newAddress(kind)
    const outcome = await placeEnquiry(visitor, email, `A ${kind} spring`, requirement)
    expect(outcome).toMatchObject({ outcome: 'quoted', reasons: [] })
    const quote = await quoteOf(visitor, outcome)
    expect([quote.state, quote.design?.kind, quote.request.kind]).toEqual(['quoted', kind, kind])
    expect(quote.notes.join('\n')).toMatch(note)
    expect(JSON.stringify(quote)).not.toMatch(/cost|margin|overhead|estimatorText|perKg/i)
    const mail = await waitForMail(email, /quote/i)
    expect(mail.text.split('\n').filter(line => / mm wire \(/.test(line)).map(line => line.trim().replace(/\.$/, ''))).toEqual([expect.stringMatching(words)])

    const estimate = (await estimator!.get<EstimatingView>(`/api/estimating/${outcome.ref}`)).body
    const [rung] = estimate.quote!.ladder
    expect(rung!.lines.find(line => line.code === 'coiling-run')!.basis).toMatch(formed)
    expect(rung!.lines.some(line => line.code === 'end-grinding')).toBe(kind === 'compression')
    expect(rung!.lines.reduce((sum, line) => sum + line.amountMinor, 0)).toBe(rung!.netMinor)
  })

  it('is paid, planned, set up by its own sheet, made, compared in the Ledger and settled', async () => {
    const { order, job } = await paidJob(`whole-${kind}`, supervisor!, requirement)
    expect(job.operations.map(step => step.kind)).toEqual(steps)
    expect(job.operations.every(step => step.setUpMinutes + step.runMinutes > 0)).toBe(true)

    const page = (await supervisor!.get<JobSheetView>(`/api/loading/jobs/${job.ref}`)).body
    expect(page.sheet?.kind).toBe(kind)
    expect(page.design?.kind).toBe(kind)
    expect(page.cautions.join('\n')).toMatch(caution)
    if (page.sheet?.kind === 'extension') expect(page.sheet).toMatchObject({ hook: 'full-loop', initialTensionN: expect.any(Number), loads: [{ lengthMm: 60 }, { lengthMm: 90 }] })
    if (page.sheet?.kind === 'torsion') expect(page.sheet).toMatchObject({ rodMm: 8, legs: [{ lengthMm: 25, form: 'tangential' }, { lengthMm: 25, form: 'tangential' }], moments: [{ momentNmm: expect.any(Number) }, { momentNmm: expect.any(Number) }] })

    const placed = await makeJob(order.ref, supervisor!, operator!)
    const centre = placed.operations.find(step => step.kind === 'coiling')!.centreCode!
    expect((await operator!.get<BenchView>(`/api/bench/${centre}`)).status).toBe(200)
    expect(await orderView(order)).toMatchObject({ state: 'finished', canPay: 'balance', design: { kind } })

    const cost = (await bookkeeper!.get<JobCostView>(`/api/ledger/jobs/${job.ref}`)).body
    expect(cost.rows.map(row => row.code)).toEqual(expect.arrayContaining(['wire', 'coiling-set-up', 'coiling-run', 'stress-relief', 'inspection', 'packing']))
    expect(cost.entries.reduce((sum, entry) => sum + entry.debitMinor - entry.creditMinor, 0)).toBe(0)
    const { body } = await order.customer.post<{ url: string }>(`/api/orders/${order.ref}/pay`, { kind: 'balance' })
    await endSession(sessionIdOf(body.url), 'paid')
    await expect.poll(async () => (await orderView(order)).canPay, { timeout: 20_000 }).toBeNull()
    const [{ version } = { version: 0 }] = await query<{ version: number }>('select version from jobs where number = $1', [Number(job.ref.slice(2))])
    expect((await supervisor!.post(`/api/loading/jobs/${job.ref}/dispatch`, { version })).status).toBe(200)
    expect((await orderView(order)).state).toBe('settled')
  })
})

describe('what each kind may ask', () => {
  const extension = (need: object, more: object = {}) => ({ kind: 'extension', need, couldHurt: 'no', quantities: [200], ...more })
  const torsion = (need: object, more: object = {}) => ({ kind: 'torsion', need, firstLegMm: 30, secondLegMm: 30, couldHurt: 'no', quantities: [200], ...more })
  it.each<[string, object]>([
    ['a load and a rate', extension({ knows: 'load-and-rate', load: { forceN: 40, lengthMm: 110 }, rateNPerMm: 0.8 })],
    ['a load and a free length', extension({ knows: 'load-and-length', load: { forceN: 50, lengthMm: 100 }, freeLengthMm: 60 })],
    ['half loops', extension(usualExtension.need, { hook: 'half-loop' })],
    ['crossed loops in stainless', extension({ knows: 'two-loads', first: { forceN: 5, lengthMm: 40 }, second: { forceN: 15, lengthMm: 55 } }, { hook: 'crossover-loop', material: 'EN10270-3-1.4310' })],
    ['hooks on a shank', extension({ knows: 'two-loads', first: { forceN: 15, lengthMm: 120 }, second: { forceN: 45, lengthMm: 170 } }, { hook: 'extended-hook' })],
    ['one moment from free', torsion({ knows: 'moment-from-free', load: { momentNmm: 500, angleDeg: 90 } })],
    ['a moment and a rate, legs along the axis, left-hand', torsion({ knows: 'moment-and-rate', load: { momentNmm: 2000, angleDeg: 60 }, rateNmmPerDeg: 25 }, { legForm: 'straight', hand: 'left' })],
  ])('a spring by %s', async (_, requirement) => {
    const { status, body } = await preview(requirement)
    expect([status, body.conflict]).toEqual([200, null])
    const design = body.design!
    expect(stops(design)).toEqual([])
    const asked = requirement as RequirementInput
    expect(design.kind).toBe(asked.kind)
    expect(design.hand).toBe(asked.hand === 'left' ? 'left' : 'right')
    if (asked.kind === 'extension' && design.spring.kind === 'extension') expect(design.spring.hook?.form).toBe(asked.hook ?? 'full-loop')
    if (asked.kind === 'torsion' && design.spring.kind === 'torsion') expect(design.spring.legs).toEqual([{ lengthMm: 30, form: asked.legForm ?? 'tangential' }, { lengthMm: 30, form: asked.legForm ?? 'tangential' }])
    expect(body.ladder).toHaveLength(1)
  })

  it('an opening load is allowed, costs stress, and waits for a person', async () => {
    const { body } = await preview(torsion({ knows: 'moment-from-free', load: { momentNmm: 500, angleDeg: 90 } }, { load: 'opens' }))
    expect(body.design?.spring).toMatchObject({ loadOpens: true })
    expect(body.waitsForPerson.map(({ code }) => code)).toContain('caution')
  })

  it('a copper alloy only where it is asked for, and then a person prices it', async () => {
    for (const requirement of [usualRequirement, usualExtension, usualTorsion, { ...usualTorsion, surroundings: 'damp' }]) expect((await preview(requirement)).body.design?.material).not.toMatch(/^ASTM-B/)
    const { body } = await preview(torsion({ knows: 'moment-from-free', load: { momentNmm: 40, angleDeg: 60 } }, { material: 'ASTM-B159', firstLegMm: 15, secondLegMm: 15 }))
    expect(body.design).toMatchObject({ material: 'ASTM-B159', materialName: 'Phosphor bronze wire' })
    expect(body.waitsForPerson.map(({ code }) => code)).toContain('material')
  })

  it('what holds much energy waits for a person, with a reason that says why', async () => {
    const requirement = { ...usualExtension, boreMm: undefined, quantities: [50], need: { knows: 'two-loads', first: { forceN: 150, lengthMm: 250 }, second: { forceN: 400, lengthMm: 350 } } } satisfies RequirementInput
    const visitor = new Visitor()
    const outcome = await placeEnquiry(visitor, newAddress('energy'), 'Gate counterweight', requirement)
    expect(outcome.outcome).toBe('waiting')
    expect(outcome.reasons.join(' ')).toMatch(/if a hook gave way, it would fly/)
  })

  it('what nothing does is told with changes that name fields of the form', async () => {
    const { status, body } = await preview({ ...usualTorsion, rodMm: 13, boreMm: 13.5 })
    expect([status, body.design]).toEqual([200, null])
    expect(body.conflict!.words).not.toBe('')
    for (const change of body.conflict!.changes) expect(['boreMm', 'rodMm', 'maxFreeLengthMm', 'need.first.momentNmm', 'need.first.angleDeg', 'need.second.momentNmm', 'need.second.angleDeg', 'hottestC', 'strokes']).toContain(change.path)
  })

  it.each<[string, object, string]>([
    ['hooks that there are none of', { ...usualExtension, hook: 'eye' }, 'requirement.hook'],
    ['legs of an extension spring', { ...usualExtension, firstLegMm: 20 }, 'requirement'],
    ['no leg', { ...usualTorsion, firstLegMm: undefined }, 'requirement.firstLegMm'],
    ['loads for a torsion spring', { ...usualTorsion, need: usualExtension.need }, 'requirement.need'],
    ['moments out of order', { ...usualTorsion, need: { ...usualTorsion.need, second: { momentNmm: 200, angleDeg: 110 } } }, 'requirement.need.second.momentNmm'],
    ['lengths out of order', { ...usualExtension, need: { ...usualExtension.need, second: { forceN: 60, lengthMm: 50 } } }, 'requirement.need.second.lengthMm'],
    ['a kind there is none of', { ...usualExtension, kind: 'leaf' }, 'requirement.kind'],
  ])('%s is refused at its field', async (_, requirement, path) => {
    const { status, body } = await new Visitor().post<{ errors?: { path: string }[] }>('/api/order/preview', { requirement })
    expect(status).toBe(422)
    expect((body.errors ?? []).map(error => error.path).join(' ')).toContain(path)
  })
})
