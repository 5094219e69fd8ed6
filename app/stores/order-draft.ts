import { defineStore } from 'pinia'
import type { SpringKind } from '#shared/spring/codes'
import type { UnitSystem } from '#shared/units/convert'
import { readKept, type KeptDraft } from '~/utils/kept-draft'
import { convertDraft, emptyDraft, PERSONAL_FIELDS, type OrderDraft, type WrittenBySystem } from '~/utils/order-draft'
import { convertShelf, isShelfEmpty, withKind, type KindShelf } from '~/utils/order-shelf'

const KEY = 'wirewright.order-draft.1'

/** The order form as typed. All but who asks is kept on the device, so that a reload loses nothing. */
export const useOrderDraftStore = defineStore('order-draft', () => {
  const draft = ref<OrderDraft>(emptyDraft())
  const written = shallowRef<WrittenBySystem>({})
  /** What was typed for the kinds that are not chosen now. */
  const shelf = shallowRef<KindShelf>({})
  /** The units that the draft is typed in. */
  const units = ref<UnitSystem>('metric')
  const keptAt = ref<string | null>(null)

  /** Chooses which way the spring works; what was typed for each kind stays its own. */
  function chooseKind(kind: SpringKind): void {
    const now = withKind({ draft: draft.value, written: written.value, shelf: shelf.value }, kind)
    draft.value = now.draft
    written.value = now.written
    shelf.value = now.shelf
  }

  function convertTo(to: UnitSystem): void {
    if (to === units.value) return
    const converted = convertDraft(draft.value, { from: units.value, to, written: written.value })
    shelf.value = convertShelf(shelf.value, { from: units.value, to })
    draft.value = converted.draft
    written.value = converted.written
    units.value = to
  }

  function keep(now: Date): void {
    const kept: Partial<OrderDraft> = { ...draft.value }
    const usual: Partial<OrderDraft> = emptyDraft()
    for (const field of PERSONAL_FIELDS) {
      Reflect.deleteProperty(kept, field)
      Reflect.deleteProperty(usual, field)
    }
    const isUntouched = isShelfEmpty(shelf.value) && Object.entries(usual).every(([field, value]) => field === 'country' || kept[field as keyof OrderDraft] === value)
    if (isUntouched) return forget()
    const at = now.toISOString()
    if (writeLocal(KEY, JSON.stringify({ draft: kept, units: units.value, keptAt: at, written: written.value, shelf: shelf.value } satisfies KeptDraft))) keptAt.value = at
  }

  function recall(): void {
    const kept = readKept(readLocal(KEY))
    if (!kept) return
    draft.value = { ...draft.value, ...kept.draft }
    units.value = kept.units
    written.value = kept.written
    shelf.value = kept.shelf
    keptAt.value = kept.keptAt
  }

  /** Starts a new form; what was typed about the person stays for the next spring in this visit. */
  function startAgain(): void {
    const { name, firm, email, country, vatNumber } = draft.value
    const fresh = { ...emptyDraft(), name, firm, email, country, vatNumber }
    draft.value = fresh
    written.value = {}
    shelf.value = {}
    forget()
  }
  function forget(): void {
    keptAt.value = null
    removeLocal(KEY)
  }

  return { draft, written, shelf, units, keptAt, chooseKind, convertTo, keep, recall, startAgain }
})
