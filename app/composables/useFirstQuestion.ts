import { formatDay } from '~/utils/day-words'
import { EXAMPLE_COMPRESSION } from '~/utils/example-spring'
import { convertDraft, emptyDraft, previewBody, readDraft } from '~/utils/order-draft'
import type { TitleCell } from '~/utils/title-cell'
import { formatWireDiameter } from '#shared/units/format'

const QUANTITIES = { quantity1: '100', quantity2: '500', quantity3: '', quantity4: '', quantity5: '', quantity6: '' } as const

/** The first question of the order form on the front page, and the spring and prices that follow from it. */
export function useFirstQuestion() {
  const units = useUnitsStore()
  const { today } = useShopTime()
  const typed = reactive({ firstForce: '', firstLength: '', secondForce: '', secondLength: '' })
  const draft = computed(() => ({ ...emptyDraft(), ...QUANTITIES, ...typed }))
  const read = computed(() => readDraft(draft.value, { units: units.system, today: today() }))
  const preview = useOrderPreview(() => previewBody(draft.value, read.value))
  const { view } = preview
  const { each, count } = usePrices(() => view.value?.currency ?? 'eur')

  watch(() => units.system, (to, from) => {
    const { draft: { firstForce, firstLength, secondForce, secondLength } } = convertDraft(draft.value, { from, to, written: {} })
    Object.assign(typed, { firstForce, firstLength, secondForce, secondLength })
  })

  const isTyped = computed(() => Object.values(typed).some(text => text.trim() !== ''))
  const design = computed(() => view.value?.design ?? null)
  const words = computed(() => preview.isAsking.value ? 'Working it out…'
    : preview.error.value ? preview.error.value.detail
      : view.value?.conflict ? 'No spring of ours does this as it stands. Go on, and we say what would make it possible.'
        : design.value ? 'Drawn to scale from your two loads.'
          : Object.values(read.value.faults)[0] ?? 'An example: 60 N at 50 mm and 150 N at 35 mm. Type your own, and it follows.')

  const cells = computed<TitleCell[]>(() => {
    const { spring } = EXAMPLE_COMPRESSION
    const { wireDiameterMm, totalCoils } = design.value ?? spring
    const rungs = view.value?.ladder ?? []
    const last = rungs.at(-1)
    return [
      { label: 'Wire', value: `${formatWireDiameter(wireDiameterMm, units.system)}${view.value?.design ? `, ${view.value.design.materialName}` : ', spring steel'}`, span: 6 },
      { label: 'Coils', value: `${Number(totalCoils.toFixed(2))}, ground ends`, span: 6 },
      ...rungs.map((rung): TitleCell => ({ label: `${count(rung.quantity)} springs`, value: `${each(rung.unitPrice)} each`, span: 4 })),
      ...(last?.dispatchOn ? [{ label: `${count(last.quantity)} can leave`, value: formatDay(last.dispatchOn), span: 4 as const }] : []),
    ]
  })

  /** Takes what is typed here over into the order form. */
  async function goOn(): Promise<void> {
    const store = useOrderDraftStore()
    store.recall()
    store.convertTo(units.system)
    store.draft = { ...store.draft, ...(isTyped.value ? { kind: 'compression' as const, knows: 'two-loads' as const, ...typed } : {}) }
    store.keep(new Date())
    await navigateTo('/order')
  }
  return { typed, design, words, cells, goOn }
}
