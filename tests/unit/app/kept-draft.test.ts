import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import { readKept } from '~/utils/kept-draft'
import { emptyDraft, type OrderDraft } from '~/utils/order-draft'
import { convertShelf, isShelfEmpty, withKind, type KindShelf } from '~/utils/order-shelf'

const typed = (values: Partial<OrderDraft>) => ({ draft: { ...emptyDraft(), ...values }, written: {}, shelf: {} as KindShelf })

describe('a draft kept on the device', () => {
  it('still loads when it was kept before there were springs that pull and twist', () => {
    const old = { draft: { knows: 'load-and-rate', firstForce: '60', firstLength: '50', rate: '6', bore: '24', strokes: '1 000' }, units: 'metric', keptAt: '2026-11-20T09:00:00.000Z', written: { rate: { text: '6', valueSi: 6.03 } } }
    const kept = readKept(JSON.stringify(old))
    expect(kept).toMatchObject({ draft: old.draft, units: 'metric', keptAt: old.keptAt, written: old.written, shelf: {} })
    expect({ ...emptyDraft(), ...kept?.draft }).toMatchObject({ kind: 'compression', rate: '6', hook: 'full-loop' })
  })

  it.each([null, '', '{', '7', 'null', '[]', '{"draft":null,"keptAt":"x"}', '{"draft":{}}', '{"draft":{},"keptAt":""}'])('is none in %s', text => expect(readKept(text)).toBeNull())

  it('leaves out what is damaged and keeps the rest', () => {
    const kept = readKept(JSON.stringify({
      draft: { kind: 'leaf', hook: 'eye', knows: 'all', firstForce: 60, firstLength: '50', stranger: 'x' }, units: 'parsec', keptAt: 'x',
      written: { firstLength: { text: '50', valueSi: 'many' }, rate: { text: '6', valueSi: 6 }, stranger: { text: '1', valueSi: 1 } },
      shelf: { extension: { texts: { firstForce: '20', bore: '4', rate: 7 } }, leaf: { texts: {} }, torsion: null },
    }))
    expect(kept).toEqual({ draft: { firstLength: '50' }, units: 'metric', keptAt: 'x', written: { rate: { text: '6', valueSi: 6 } }, shelf: { extension: { texts: { firstForce: '20' }, written: {} } } })
  })

  it('never throws, whatever stands there', () => {
    fc.assert(fc.property(fc.jsonValue(), (value) => {
      const kept = readKept(JSON.stringify({ draft: value, written: value, shelf: { extension: value, torsion: { texts: value, written: value } }, keptAt: 'x' }))
      return kept === null || Object.keys(kept.draft).every(field => field in emptyDraft())
    }))
  })
})

describe('choosing another kind', () => {
  it('keeps the loads of each kind for itself, and the place for all', () => {
    const push = typed({ firstForce: '60', firstLength: '50', longest: '62', bore: '24' })
    const pull = withKind(push, 'extension')
    expect(pull.draft).toMatchObject({ kind: 'extension', firstForce: '', firstLength: '', longest: '', bore: '24' })
    const pulled = { ...pull, draft: { ...pull.draft, firstForce: '20', firstLength: '80' } }
    const pushAgain = withKind(withKind(pulled, 'torsion'), 'compression')
    expect(pushAgain.draft).toEqual({ ...push.draft })
    expect(withKind(pushAgain, 'extension').draft).toEqual(pulled.draft)
  })

  it('brings back the exact value behind a text that a change of units wrote', () => {
    const push = { ...typed({ firstForce: '13.489' }), written: { firstForce: { text: '13.489', valueSi: 60 }, bore: { text: '1', valueSi: 25.4 } } }
    const pull = withKind(push, 'extension')
    expect(pull.written).toEqual({ bore: { text: '1', valueSi: 25.4 } })
    expect(withKind(pull, 'compression').written).toEqual(push.written)
  })

  it('changes nothing when it is the same kind', () => {
    const push = typed({ firstForce: '60' })
    expect(withKind(push, 'compression')).toEqual(push)
  })

  it('loses nothing when the units are changed meanwhile and back', () => {
    const { shelf } = withKind(typed({ firstForce: '60', firstLength: '50', rate: 'about six' }), 'torsion')
    const inch = convertShelf(shelf, { from: 'metric', to: 'inch' })
    expect(inch.compression?.texts).toMatchObject({ firstForce: '13.489', firstLength: '1.9685', rate: 'about six' })
    expect(convertShelf(inch, { from: 'inch', to: 'metric' }).compression?.texts).toEqual(shelf.compression?.texts)
  })

  it('knows whether anything is put by', () => {
    expect(isShelfEmpty(withKind(typed({}), 'torsion').shelf)).toBe(true)
    expect(isShelfEmpty(withKind(typed({ rate: '6' }), 'torsion').shelf)).toBe(false)
  })
})
