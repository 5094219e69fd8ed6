import { getNode } from '@formkit/core'
import { unitSymbol } from '#shared/units/convert'
import { EXAMPLE_NEEDS } from '~/utils/example-spring'
import { formatWeekday } from '~/utils/day-words'
import { missingFields, previewBody, readDraft, typedNumber, type OrderDraft } from '~/utils/order-draft'
import { ORDER_FIELDS, orderFieldId, quantityOf, type OrderFieldName } from '~/utils/order-fields'
import { ORDER_READ_KEY } from '~/utils/order-keys'
import { openItems } from '~/utils/order-open'
import type { TitleCell } from '~/utils/title-cell'

const KEEP_AFTER_MS = 500

/** The whole order form: the draft as typed and kept, the spring that follows from it, what is open, and the sending. */
export function useOrderForm() {
  const store = useOrderDraftStore()
  const units = useUnitsStore()
  const { today, moment } = useShopTime()

  const read = computed(() => readDraft(store.draft, { units: store.units, today: today(), written: store.written }))
  provide(ORDER_READ_KEY, read)
  const body = computed(() => previewBody(store.draft, read.value))
  const preview = useOrderPreview(() => body.value)
  const submit = useOrderSubmit({ draft: () => store.draft, read: () => read.value })
  const isOld = computed(() => body.value === null && preview.view.value !== null)

  // What is kept on the device, and the units, are known only to the browser: the page is rendered once for everybody.
  let keepLater: ReturnType<typeof setTimeout> | undefined
  /** Keeps at once what was still to be kept: the page is being left. */
  const keepNow = () => {
    if (keepLater === undefined) return
    clearTimeout(keepLater)
    keepLater = undefined
    store.keep(new Date())
  }
  onMounted(() => {
    window.addEventListener('pagehide', keepNow)
    units.recall()
    store.recall()
    store.convertTo(units.system)
    watch(() => units.system, system => store.convertTo(system))
    watch(() => store.draft, () => {
      clearTimeout(keepLater)
      keepLater = setTimeout(keepNow, KEEP_AFTER_MS)
      submit.recheck()
    }, { deep: true })
  })
  onScopeDispose(() => {
    if (import.meta.client) window.removeEventListener('pagehide', keepNow)
    clearTimeout(keepLater)
  })
  watch(submit.errors, found => getNode('order-form')?.setErrors([], Object.fromEntries(Object.entries(found).map(([field, message]) => [field, message ?? '']))))

  const chosen = ref<number | null>(null)
  watch(preview.view, (view) => {
    const quantities = view?.ladder.map(one => one.quantity) ?? []
    if (chosen.value === null || !quantities.includes(chosen.value)) chosen.value = quantities[Math.floor((quantities.length - 1) / 2)] ?? null
  })
  const rung = computed(() => preview.view.value?.ladder.find(one => one.quantity === chosen.value) ?? null)
  const { each, count } = usePrices(() => preview.view.value?.currency ?? 'eur')
  const said = ref('')
  watch(preview.view, (view) => {
    if (!view) return
    said.value = view.conflict ? `No spring fits. ${view.conflict.words}`
      : rung.value ? `${count(rung.value.quantity)} springs at ${each(rung.value.unitPrice)} each${rung.value.dispatchOn ? `, can be dispatched on ${formatDay(rung.value.dispatchOn)}` : ''}.` : 'The spring is drawn.'
  })
  watch(preview.error, (error) => { if (error) said.value = error.detail })

  const complaints = computed(() => Object.entries(preview.error.value?.fieldErrors ?? {}).flatMap(([path, message]) => {
    const field = read.value.fieldOfPath[path]
    return field ? [{ fieldId: orderFieldId(field), words: ORDER_FIELDS[field].words, message }] : []
  }))
  const clash = useOrderClash({ view: () => preview.view.value, isOld: () => isOld.value, read: () => read.value, say: (words) => { said.value = words } })
  const open = computed(() => openItems(new Set([...missingFields(store.draft), ...Object.keys(read.value.faults) as OrderFieldName[], ...clash.fields.value.slice(0, 2)])))

  const change = (values: Partial<OrderDraft>) => { store.draft = { ...store.draft, ...values } }

  async function send(): Promise<void> {
    await submit.submit(units.system)
    const outcome = submit.outcome.value
    if (!outcome) return
    clearTimeout(keepLater)
    store.startAgain()
    if (outcome.outcome === 'quoted') {
      submit.outcome.value = null
      await navigateTo({ path: `/quotes/${outcome.ref}`, query: { key: outcome.key } })
    }
  }

  const foot = computed<TitleCell[]>(() => {
    const book = preview.view.value
    return [
      { label: 'Document', value: 'Order form' },
      { label: 'Kept on this device', value: store.keptAt ? moment(store.keptAt) : 'nothing yet' },
      { label: 'Prices', value: `${(book?.currency ?? 'eur').toUpperCase()}, before VAT` },
      { label: 'Price book', value: book ? `${book.priceBookNumber}, of ${formatDay(book.priceBookInForceFrom)}` : 'the one in force' },
      { label: 'Units', value: `${unitSymbol('length', units.system)}, ${unitSymbol('force', units.system)}` },
      { label: 'Maker', value: 'Oxmere Spring Works' },
    ]
  })

  return {
    store, units, ...preview, errors: submit.errors, failure: submit.failure, outcome: submit.outcome, isSending: submit.isSending,
    isOld, chosen, rung, said, complaints, clash, open, foot, send,
    neededOn: computed(() => typeof read.value.requirement.neededOn === 'string' ? read.value.requirement.neededOn : ''),
    dayReading: computed(() => typeof read.value.requirement.neededOn === 'string' ? formatWeekday(read.value.requirement.neededOn) : ''),
    setNeededOn: (day: string) => change({ neededOn: formatDay(day) }),
    useExample: () => change({ kind: store.draft.kind, ...exampleInUnits(EXAMPLE_NEEDS[store.draft.kind], store.units) }),
    startAgain: () => { submit.outcome.value = null },
  }
}

/** The example's numbers, which are metric, as they are typed in the units of the form. */
function exampleInUnits(example: Partial<OrderDraft>, units: 'metric' | 'inch'): Partial<OrderDraft> {
  if (units === 'metric') return example
  return Object.fromEntries(Object.entries(example).map(([field, text]) => {
    const quantity = quantityOf(field as OrderFieldName)
    return [field, quantity ? typedNumber(Number(text), quantity, units) : text]
  }))
}
