import { defineStore } from 'pinia'
import type { UnitSystem } from '#shared/units/convert'
import { convertDraft, emptyDraft, PERSONAL_FIELDS, type OrderDraft, type WrittenBySystem } from '~/utils/order-draft'

const KEY = 'wirewright.order-draft.1'
type Kept = { draft: Partial<OrderDraft>, units: UnitSystem, keptAt: string, written: WrittenBySystem }

/** The order form as typed. All but who asks is kept on the device, so that a reload loses nothing. */
export const useOrderDraftStore = defineStore('order-draft', () => {
  const draft = ref<OrderDraft>(emptyDraft())
  const written = shallowRef<WrittenBySystem>({})
  /** The units that the draft is typed in. */
  const units = ref<UnitSystem>('metric')
  const keptAt = ref<string | null>(null)

  function convertTo(to: UnitSystem): void {
    if (to === units.value) return
    const converted = convertDraft(draft.value, { from: units.value, to, written: written.value })
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
    const isUntouched = Object.entries(usual).every(([field, value]) => field === 'country' || kept[field as keyof OrderDraft] === value)
    if (isUntouched) return forget()
    const at = now.toISOString()
    if (writeLocal(KEY, JSON.stringify({ draft: kept, units: units.value, keptAt: at, written: written.value } satisfies Kept))) keptAt.value = at
  }

  function recall(): void {
    const kept = readKept(readLocal(KEY))
    if (!kept) return
    draft.value = { ...draft.value, ...kept.draft }
    units.value = kept.units
    written.value = kept.written
    keptAt.value = kept.keptAt
  }

  /** Starts a new form; what was typed about the person stays for the next spring in this visit. */
  function startAgain(): void {
    const { name, firm, email, country, vatNumber } = draft.value
    const fresh = { ...emptyDraft(), name, firm, email, country, vatNumber }
    draft.value = fresh
    written.value = {}
    forget()
  }
  function forget(): void {
    keptAt.value = null
    removeLocal(KEY)
  }

  return { draft, written, units, keptAt, convertTo, keep, recall, startAgain }
})

/** A kept draft as far as it has the form of one: an older or damaged one is left. */
function readKept(text: string | null): Kept | null {
  if (!text) return null
  try {
    const value: unknown = JSON.parse(text)
    if (typeof value !== 'object' || value === null || !('draft' in value) || typeof value.draft !== 'object' || value.draft === null) return null
    const given = value.draft as Record<string, unknown>
    const draft: Record<string, unknown> = {}
    for (const [field, usual] of Object.entries(emptyDraft())) {
      if (typeof given[field] === typeof usual) draft[field] = given[field]
    }
    const units = 'units' in value && value.units === 'inch' ? 'inch' : 'metric'
    const keptAt = 'keptAt' in value && typeof value.keptAt === 'string' ? value.keptAt : ''
    const written = 'written' in value && typeof value.written === 'object' && value.written !== null ? value.written as WrittenBySystem : {}
    return keptAt ? { draft, units, keptAt, written } : null
  }
  catch {
    return null
  }
}
