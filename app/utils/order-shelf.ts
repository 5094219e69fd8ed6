import { SPRING_KINDS, type SpringKind } from '#shared/spring/codes'
import type { UnitSystem } from '#shared/units/convert'
import { convertDraft, emptyDraft, type OrderDraft, type WrittenBySystem } from './order-draft'

/** Fields that more than one kind asks for and that mean something else in each: a load that pushes is no load that pulls. */
const SHARED_FIELDS = ['firstForce', 'firstLength', 'secondForce', 'secondLength', 'rate', 'freeLength', 'longest'] as const
type SharedField = typeof SHARED_FIELDS[number]
type Texts = Partial<Record<SharedField, string>>

/** What was typed into the shared fields for the kinds that are not chosen now. */
export type KindShelf = Partial<Record<SpringKind, { texts: Texts, written: WrittenBySystem }>>

type Typed = { draft: OrderDraft, written: WrittenBySystem, shelf: KindShelf }

/** The form with another kind chosen: what was typed for the one before is put by, what was typed for this one comes back. */
export function withKind({ draft, written, shelf }: Typed, kind: SpringKind): Typed {
  if (kind === draft.kind) return { draft, written, shelf }
  const back = shelf[kind]
  const texts: Texts = {}
  const textsNow: Texts = {}
  const putBy: WrittenBySystem = {}
  const kept: WrittenBySystem = { ...written }
  for (const field of SHARED_FIELDS) {
    texts[field] = draft[field]
    textsNow[field] = back?.texts[field] ?? ''
    if (written[field]) putBy[field] = written[field]
    Reflect.deleteProperty(kept, field)
  }
  const { [kind]: _taken, ...others } = shelf
  return {
    draft: { ...draft, ...textsNow, kind }, written: { ...kept, ...back?.written },
    shelf: { ...others, [draft.kind]: { texts, written: putBy } },
  }
}

/** The shelf in other units. */
export function convertShelf(shelf: KindShelf, { from, to }: { from: UnitSystem, to: UnitSystem }): KindShelf {
  const converted: KindShelf = {}
  for (const kind of SPRING_KINDS) {
    const one = shelf[kind]
    if (!one) continue
    const { draft, written } = convertDraft({ ...emptyDraft(), ...one.texts }, { from, to, written: one.written })
    const texts: Texts = {}
    const own: WrittenBySystem = {}
    for (const field of SHARED_FIELDS) {
      texts[field] = draft[field]
      if (written[field]) own[field] = written[field]
    }
    converted[kind] = { texts, written: own }
  }
  return converted
}

/** True when nothing is put by for any kind. */
export const isShelfEmpty = (shelf: KindShelf): boolean => Object.values(shelf).every(one => Object.values(one.texts).every(text => text.trim() === ''))

/** A shelf as kept on the device, as far as it has the form of one. */
export function readShelf(value: unknown, readWritten: (value: unknown) => WrittenBySystem): KindShelf {
  const shelf: KindShelf = {}
  if (typeof value !== 'object' || value === null) return shelf
  const given = value as Record<string, unknown>
  for (const kind of SPRING_KINDS) {
    const one = given[kind]
    if (typeof one !== 'object' || one === null || !('texts' in one) || typeof one.texts !== 'object' || one.texts === null) continue
    const { texts } = one
    shelf[kind] = {
      texts: Object.fromEntries(Object.entries(texts).filter(([field, text]) => (SHARED_FIELDS as readonly string[]).includes(field) && typeof text === 'string')),
      written: 'written' in one ? readWritten(one.written) : {},
    }
  }
  return shelf
}
