import type { ConflictView, PreviewView } from '#shared/schemas/quote'
import { unitSymbol, type UnitSystem } from '#shared/units/convert'
import { formatNumber, THIN_SPACE } from '#shared/units/format'
import { isChoice, typedNumber, type ReadDraft } from '~/utils/order-draft'
import { ORDER_FIELDS, orderFieldId, quantityOf, type OrderFieldName } from '~/utils/order-fields'

export type ClashChange = ConflictView['changes'][number]
/** A change as it is offered: its number is the very one that is then typed, in the units of the form. */
export type OfferedChange = { change: ClashChange, words: string }
/** A change that was taken and can be put back. */
export type MadeChange = { field: OrderFieldName, words: string, beforeWords: string }

type Taken = { field: OrderFieldName, change: ClashChange, beforeText: string, beforeSi: number | undefined, beforeUnits: UnitSystem }
type Sources = { view: () => PreviewView | null, isOld: () => boolean, read: () => ReadDraft, say: (words: string) => void }

/** What stands in the way of a spring, the single changes that would give one, and those that were taken, until they are put back or typed over. */
export function useOrderClash({ view, isOld, read, say }: Sources) {
  const store = useOrderDraftStore()
  const taken = shallowRef<readonly Taken[]>([])

  const conflict = computed(() => isOld() ? null : view()?.conflict ?? null)
  const fields = computed(() => (conflict.value?.changes ?? []).flatMap(({ path }) => fieldOf(path) ?? []))
  const section = computed(() => conflict.value ? fields.value[0] ? ORDER_FIELDS[fields.value[0]].section : 1 : null)
  const offered = computed<OfferedChange[]>(() => (conflict.value?.changes ?? []).map(change => ({ change, words: wordsOf(change) })))
  const made = computed<MadeChange[]>(() => taken.value.filter(stands).map(one => ({ field: one.field, words: wordsOf(one.change), beforeWords: beforeWords(one) })))

  function fieldOf(path: string): OrderFieldName | undefined {
    return read().fieldOfPath[path.startsWith('requirement.') ? path : `requirement.${path}`]
  }
  function textOf({ to }: ClashChange, field: OrderFieldName | undefined): string {
    const quantity = field && quantityOf(field)
    return typeof to !== 'number' ? to : quantity ? typedNumber(to, quantity, store.units) : formatNumber(to)
  }
  function wordsOf(change: ClashChange): string {
    const field = fieldOf(change.path)
    const quantity = field && quantityOf(field)
    if (field && quantity) return `${change.label} ${withUnit(textOf(change, field), field)}`
    return `${change.label} ${field === 'strokes' ? `${textOf(change, field)} strokes` : change.toText}`
  }
  function withUnit(text: string, field: OrderFieldName): string {
    const quantity = quantityOf(field)
    if (!quantity) return text
    return quantity === 'angle' ? `${text}°` : text + THIN_SPACE + unitSymbol(quantity, store.units)
  }

  /** Whether a change still stands in the form: nobody has typed over it. */
  function stands({ field, change: { to } }: Taken): boolean {
    const { valuesSi, requirement } = read()
    return quantityOf(field) ? valuesSi[field] === to : requirement[field] === to
  }
  const beforeNow = ({ field, beforeText, beforeSi, beforeUnits }: Taken): string => {
    const quantity = quantityOf(field)
    return quantity && beforeSi !== undefined && beforeUnits !== store.units ? typedNumber(beforeSi, quantity, store.units) : beforeText
  }
  const beforeWords = (one: Taken): string => one.beforeText.trim() === '' ? '' : one.beforeSi !== undefined && /^[+-]?[\d.]+$/.test(beforeNow(one)) ? withUnit(beforeNow(one), one.field) : beforeNow(one)

  /** Makes one of the changes that would give a spring, in the units of the form, and leads there. */
  function apply(change: ClashChange): void {
    const field = fieldOf(change.path)
    if (!field || isChoice(field)) return
    // A second click on the same change is no change: what was typed is what stood before the first.
    if (!taken.value.some(one => one.field === field && stands(one))) {
      const before: Taken = { field, change, beforeText: store.draft[field], beforeSi: read().valuesSi[field], beforeUnits: store.units }
      taken.value = [...taken.value.filter(one => one.field !== field), before]
    }
    else {
      taken.value = taken.value.map(one => one.field === field ? { ...one, change } : one)
    }
    write(field, textOf(change, field), typeof change.to === 'number' && quantityOf(field) ? change.to : undefined)
    say(`Changed to ${wordsOf(change)}.`)
  }

  /** Types back what stood in a field before a change was taken. */
  function putBack(field: OrderFieldName): void {
    const one = taken.value.find(each => each.field === field)
    if (!one || isChoice(field)) return
    const words = beforeWords(one)
    taken.value = taken.value.filter(each => each !== one)
    write(field, beforeNow(one), one.beforeSi)
    say(words ? `Back to ${words}.` : `${ORDER_FIELDS[field].words} is empty again.`)
  }

  function write(field: OrderFieldName, text: string, valueSi: number | undefined): void {
    const { [field]: _old, ...written } = store.written
    store.written = valueSi === undefined ? written : { ...written, [field]: { text, valueSi } }
    store.draft = { ...store.draft, [field]: text }
    document.getElementById(orderFieldId(field))?.focus()
  }

  return { conflict, fields, section, offered, made, apply, putBack }
}
