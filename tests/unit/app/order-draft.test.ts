import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { enquiryRequestSchema, previewBodySchema, requirementSchema } from '#shared/schemas/enquiry'
import { draftOfRequirement } from '~/utils/draft-of-requirement'
import { convertDraft, emptyDraft, missingFields, previewBody, readDraft, type OrderDraft } from '~/utils/order-draft'
import { openItems } from '~/utils/order-open'

const draftOf = (values: Partial<OrderDraft>): OrderDraft => ({ ...emptyDraft(), firstForce: '60', firstLength: '50', secondForce: '150', secondLength: '35', couldHurt: 'no', ...values })
const read = (values: Partial<OrderDraft>, units: 'metric' | 'inch' = 'metric') => readDraft(draftOf(values), { units, today: '2026-12-01' })

describe('reading the order form', () => {
  it('reads numbers leniently, with their own units', () => {
    const { requirement, faults } = read({ bore: '.945"', rod: '17,5 mm', longest: '62', strokes: '10 000 000', quantity4: '1 000' })
    expect(faults).toEqual({})
    expect(requirement).toMatchObject({ rodMm: 17.5, maxFreeLengthMm: 62, strokes: 10_000_000, quantities: [100, 250, 500, 1000, 2000] })
    expect(requirement.boreMm).toBeCloseTo(24.003, 9)
  })

  it('says which field could not be read, and keeps the others', () => {
    const { faults, valuesSi } = read({ bore: 'wide', rod: '19', quantity2: '1,500' })
    expect(faults.bore).toBe('\'wide\' is not a number. Write it as 12.5.')
    expect(faults.quantity2).toContain('two ways')
    expect(valuesSi.rod).toBe(19)
  })

  it('gives a body that the server’s schema takes', () => {
    const { requirement, contact } = read({ title: 'Return spring', name: 'Ilse Varrow', firm: 'Tarnbeck Valve Co.', email: 'ilse@tarnbeck.example', neededOn: '14 Dec' })
    const parsed = enquiryRequestSchema.parse({ requirement, contact, units: 'metric', website: '' })
    expect(parsed.requirement).toMatchObject({ need: { knows: 'two-loads', first: { forceN: 60, lengthMm: 50 }, second: { forceN: 150, lengthMm: 35 } }, neededOn: '2026-12-14', coldestC: 5, hottestC: 40 })
    expect(parsed.contact.vatNumber).toBeUndefined()
  })

  it.each([
    [{ secondLength: '55' }, 'secondLength'], [{ secondForce: '10' }, 'secondForce'], [{ firstForce: '' }, 'firstForce'], [{ bore: '10', rod: '12' }, 'bore'], [{ quantity1: '', quantity2: '250', quantity3: '250' }, 'quantity1'],
    [{ quantity2: '0' }, 'quantity2'], [{ couldHurt: '' }, 'couldHurt'], [{ strokes: '1.5' }, 'strokes'], [{ knows: 'rate-and-length', rate: '6', freeLength: '30', shortestLength: '40' }, 'shortestLength'],
    [{ knows: 'load-and-rate', rate: '' }, 'rate'], [{ coldest: '50', hottest: '20' }, 'hottest'],
  ] as const)('leads the schema’s complaint about %j to its field', (values, field) => {
    const { requirement, fieldOfPath } = read(values as Partial<OrderDraft>)
    const issues = requirementSchema.safeParse(requirement).error?.issues ?? []
    const fields = issues.map(issue => fieldOfPath[`requirement.${issue.path.join('.')}`])
    expect(fields).toContain(field)
  })

  it('ignores the loads that the chosen way does not ask for', () => {
    const { faults, requirement } = read({ knows: 'rate-and-length', secondForce: 'nonsense', rate: '6', freeLength: '60', shortestLength: '35' })
    expect(faults).toEqual({})
    expect(requirement.need).toEqual({ knows: 'rate-and-length', rateNPerMm: 6, freeLengthMm: 60, shortestLengthMm: 35 })
  })
})

describe('the preview of an order', () => {
  it('is asked for once the spring is described, without waiting for who asks', () => {
    const draft = draftOf({ couldHurt: '' })
    const body = previewBody(draft, readDraft(draft, { units: 'metric', today: '2026-12-01' }))
    expect(previewBodySchema.parse(body).requirement.couldHurt).toBe('no')
  })

  it.each([{ secondForce: '' }, { bore: 'x' }, { quantity1: '', quantity2: '', quantity3: '', quantity4: '', quantity5: '' }, { neededOn: '1/2/27' }])('is not asked for with %j', (values) => {
    const draft = draftOf(values)
    expect(previewBody(draft, readDraft(draft, { units: 'metric', today: '2026-12-01' }))).toBeNull()
  })
})

describe('changing the units', () => {
  it('rewrites what is typed and gives the same spring', () => {
    const metric = draftOf({ bore: '24', hottest: '60', rate: '6.03' })
    const { draft, written } = convertDraft(metric, { from: 'metric', to: 'inch', written: {} })
    expect(draft).toMatchObject({ firstForce: '13.489', firstLength: '1.9685', bore: '0.9449', hottest: '140', quantity1: '100' })
    const before = readDraft(metric, { units: 'metric', today: '2026-12-01' })
    expect(readDraft(draft, { units: 'inch', today: '2026-12-01', written }).requirement).toEqual(before.requirement)
  })

  it('comes back to the very same sizes, however often it is changed', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 99_999 }), fc.integer({ min: 0, max: 6 }), (hundredths, turns) => {
      let state = { draft: draftOf({ bore: String(hundredths / 100) }), written: {} }
      let units: 'metric' | 'inch' = 'metric'
      for (let turn = 0; turn < turns * 2; turn++) {
        const to: 'metric' | 'inch' = units === 'metric' ? 'inch' : 'metric'
        state = convertDraft(state.draft, { from: units, to, written: state.written })
        units = to
      }
      return readDraft(state.draft, { units, today: '2026-12-01', written: state.written }).valuesSi.bore === hundredths / 100
    }))
  })

  it('believes a new text over the value it once wrote', () => {
    const { draft, written } = convertDraft(draftOf({ bore: '24' }), { from: 'metric', to: 'inch', written: {} })
    expect(readDraft({ ...draft, bore: '1' }, { units: 'inch', today: '2026-12-01', written }).valuesSi.bore).toBeCloseTo(25.4, 9)
  })

  it('leaves what cannot be read as it was typed', () => {
    expect(convertDraft(draftOf({ bore: 'wide' }), { from: 'metric', to: 'inch', written: {} }).draft.bore).toBe('wide')
  })
})

describe('springs that pull and twist', () => {
  const pull = { kind: 'extension', firstForce: '20', firstLength: '60', secondForce: '50', secondLength: '80', hook: 'crossover-loop' } as const
  const twist = { kind: 'torsion', firstMoment: '0.3 N·m', firstAngle: '30', secondMoment: '900', secondAngle: '90', firstLeg: '30', secondLeg: '25', load: 'opens' } as const

  it('gives the server a spring that pulls, without what only pressed springs have', () => {
    const { requirement, faults } = read({ ...pull, shortestRoom: 'nonsense' })
    expect(faults).toEqual({})
    expect(requirementSchema.parse(requirement)).toMatchObject({ kind: 'extension', hook: 'crossover-loop', need: { knows: 'two-loads', first: { forceN: 20, lengthMm: 60 }, second: { forceN: 50, lengthMm: 80 } } })
  })

  it('gives the server a spring that twists, whatever unit its moments are typed in', () => {
    const { requirement, faults } = read(twist)
    expect(faults).toEqual({})
    expect(requirementSchema.parse(requirement)).toMatchObject({
      kind: 'torsion', firstLegMm: 30, secondLegMm: 25, load: 'opens', legForm: 'tangential',
      need: { knows: 'two-moments', first: { momentNmm: 300, angleDeg: 30 }, second: { momentNmm: 900, angleDeg: 90 } },
    })
  })

  it.each([
    [{ ...pull, secondLength: '50' }, 'secondLength'], [{ ...pull, secondForce: '10' }, 'secondForce'], [{ ...pull, knowsExtension: 'load-and-length', freeLength: '70' }, 'firstLength'],
    [{ ...twist, secondAngle: '20' }, 'secondAngle'], [{ ...twist, secondMoment: '100' }, 'secondMoment'], [{ ...twist, firstLeg: '' }, 'firstLeg'], [{ ...twist, knowsTorsion: 'moment-and-rate', turnRate: '' }, 'turnRate'],
  ] as const)('leads the schema’s complaint about %j to its field', (values, field) => {
    const { requirement, fieldOfPath } = read(values as Partial<OrderDraft>)
    const issues = requirementSchema.safeParse(requirement).error?.issues ?? []
    expect(issues.map(issue => fieldOfPath[`requirement.${issue.path.join('.')}`])).toContain(field)
  })

  it('keeps what was typed for one kind while another is looked at', () => {
    const draft = draftOf({ ...twist, rate: '6.03' })
    expect(readDraft({ ...draft, kind: 'compression', knows: 'load-and-rate' }, { units: 'metric', today: '2026-12-01' }).valuesSi.rate).toBe(6.03)
    expect(missingFields(draft)).not.toContain('firstForce')
    expect(missingFields({ ...draft, firstMoment: '' })).toContain('firstMoment')
  })

  it.each([[pull, 'metric'], [pull, 'inch'], [twist, 'metric'], [twist, 'inch'], [{ ...twist, knowsTorsion: 'moment-and-rate', turnRate: '10' }, 'inch'], [{ ...pull, knowsExtension: 'load-and-rate', rate: '1.5' }, 'inch']] as const)(
    'types a stored request back so that it is read as the same: %j in %s', (values, units) => {
      const requirement = requirementSchema.parse(read(values as Partial<OrderDraft>).requirement)
      const { draft, written } = draftOfRequirement(requirement, units)
      expect(requirementSchema.parse(readDraft({ ...emptyDraft(), ...draft }, { units, today: '2026-12-01', written }).requirement)).toEqual(requirement)
    })
})

describe('what is still open', () => {
  it('is named by section, each leading to its first field', () => {
    const items = openItems(missingFields({ ...emptyDraft(), name: 'Ilse' }))
    expect(items).toEqual([
      { section: 1, fieldId: 'order-firstForce', words: 'Loads and lengths' }, { section: 3, fieldId: 'order-couldHurt', words: 'Could it hurt someone' },
      { section: 5, fieldId: 'order-title', words: 'What it is for, firm, e-mail' },
    ])
  })

  it('is nothing when all is filled in', () => {
    expect(openItems(missingFields(draftOf({ title: 'a', name: 'b', firm: 'c', email: 'd' })))).toEqual([])
  })
})

describe('asking for the same again', () => {
  it.each(['metric', 'inch'] as const)('types a stored request back so that it is read as the same (%s)', (units) => {
    const asked = read({ bore: '24', rod: '17.1', longest: '62', neededOn: '14 Dec', material: 'EN10270-1-SH', quantity6: '5000' }).requirement
    const requirement = requirementSchema.parse(asked)
    const { draft, written } = draftOfRequirement(requirement, units)
    const again = readDraft({ ...emptyDraft(), ...draft }, { units, today: '2026-12-01', written })
    expect(again.faults).toEqual({})
    expect(requirementSchema.parse(again.requirement)).toEqual(requirement)
  })
})
