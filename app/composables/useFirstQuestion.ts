import type { SpringKind } from '#shared/spring/codes'
import type { UnitSystem } from '#shared/units/convert'
import { drawnCompression, type MovedSpring } from '#shared/spring/drawing/moved'
import { ENDS, HOOKS } from '#shared/spring/sheet/words'
import { formatLength, formatNumber, formatWireDiameter } from '#shared/units/format'
import { formatDay } from '~/utils/day-words'
import { EXAMPLE_SPRINGS, EXAMPLE_WORDS } from '~/utils/example-spring'
import { firstFields } from '~/utils/first-question'
import { convertDraft, emptyDraft, previewBody, readDraft, type OrderDraft } from '~/utils/order-draft'
import type { OrderTextName } from '~/utils/order-fields'
import type { TitleCell } from '~/utils/title-cell'

const QUANTITIES = { quantity1: '100', quantity2: '500', quantity3: '', quantity4: '', quantity5: '', quantity6: '' } as const
type Typed = Partial<Record<OrderTextName, string>>
const KINDS = ['compression', 'extension', 'torsion'] as const
const FOLLOWS = { compression: 'your two loads', extension: 'your two loads', torsion: 'your two moments' } as const

/** The first question of the order form on the front page, and the spring and prices that follow from it. */
export function useFirstQuestion() {
  const units = useUnitsStore()
  const { today } = useShopTime()
  const kind = ref<SpringKind>('compression')
  /** What is typed for each kind stays its own. */
  const typedBy = reactive<Record<SpringKind, Typed>>({ compression: {}, extension: {}, torsion: {} })
  const typed = computed(() => typedBy[kind.value])
  const draftOf = (one: SpringKind): OrderDraft => ({ ...emptyDraft(), ...QUANTITIES, kind: one, ...typedBy[one] })
  const draft = computed(() => draftOf(kind.value))
  const read = computed(() => readDraft(draft.value, { units: units.system, today: today() }))
  const preview = useOrderPreview(() => previewBody(draft.value, read.value))
  const { view } = preview
  const { each, count } = usePrices(() => view.value?.currency ?? 'eur')

  watch(() => units.system, (to, from) => {
    for (const one of KINDS) {
      const converted = convertDraft(draftOf(one), { from, to, written: {} }).draft
      for (const field of firstFields(one)) if (typedBy[one][field]) typedBy[one][field] = String(converted[field])
    }
  })

  const isTyped = computed(() => Object.values(typed.value).some(text => text.trim() !== ''))
  const isComplete = computed(() => firstFields(kind.value).every(field => (typed.value[field] ?? '').trim() !== ''))
  /** The spring that was found; not that of another kind, which may still be there while the next answer is on its way. */
  const design = computed(() => view.value?.design?.kind === kind.value && isComplete.value ? view.value.design : null)
  const words = computed(() => preview.isAsking.value ? 'Working it out…'
    : preview.error.value ? preview.error.value.detail
      : isComplete.value && view.value?.conflict ? 'No spring of ours does this as it stands. Go on, and we say what would make it possible.'
        : design.value ? `Drawn to scale from ${FOLLOWS[kind.value]}.`
          : Object.values(read.value.faults)[0] ?? `An example: ${EXAMPLE_WORDS[kind.value]}. Type your own, and it follows.`)

  const cells = computed<TitleCell[]>(() => {
    const { wireDiameterMm } = design.value ?? EXAMPLE_SPRINGS[kind.value].spring
    const rungs = design.value ? view.value?.ladder ?? [] : []
    const last = rungs.at(-1)
    return [
      { label: 'Wire', value: `${formatWireDiameter(wireDiameterMm, units.system)}${design.value ? `, ${design.value.materialName}` : ', spring steel'}`, span: 6 },
      { label: 'Coils', value: coilsWords(design.value ?? EXAMPLE_SPRINGS[kind.value], units.system), span: 6 },
      ...rungs.map((rung): TitleCell => ({ label: `${count(rung.quantity)} springs`, value: `${each(rung.unitPrice)} each`, span: 4 })),
      ...(last?.dispatchOn ? [{ label: `${count(last.quantity)} can leave`, value: formatDay(last.dispatchOn), span: 4 as const }] : []),
    ]
  })
  /** Takes what is typed here over into the order form. */
  async function goOn(): Promise<void> {
    const store = useOrderDraftStore()
    store.recall()
    store.convertTo(units.system)
    store.chooseKind(kind.value)
    if (isTyped.value) store.draft = { ...store.draft, knows: 'two-loads', knowsExtension: 'two-loads', knowsTorsion: 'two-moments', ...typed.value }
    store.keep(new Date())
    await navigateTo('/order')
  }
  return { kind, typed, design, words, cells, goOn }
}

/** How many coils, and how they end: `10.25, ground ends`. */
function coilsWords(one: MovedSpring, units: UnitSystem): string {
  const coils = (count: number) => formatNumber(count, 2).replace(/\.?0+$/, '')
  switch (one.kind) {
    case 'compression': return `${coils(drawnCompression(one.spring).totalCoils)}, ends ${ENDS[one.spring.ends ?? 'closed-ground']}`
    case 'extension': return `${coils(one.evaluation.bodyCoils)}, ${HOOKS[one.spring.hook?.form ?? 'full-loop']}`
    case 'torsion': return `${coils(one.evaluation.bodyCoils)}, legs ${(one.spring.legs ?? []).map(leg => formatLength(leg.lengthMm, units)).join(' and ')}`
  }
}
