import type { AcceptedQuote, QuoteView } from '#shared/schemas/quote'
import type { OrderState } from '#shared/schemas/order-states'
import { draftOfRequirement } from '~/utils/draft-of-requirement'
import { send } from '~/utils/send'

/** A quote as its customer reads it, and what can be done with it: accept, decline, confirm the address, pay, change. */
export function useQuote(orderRef: string, key: string | undefined) {
  const quote = useFetch<QuoteView>(`/api/quotes/${orderRef}`, { key: `quote-${orderRef}`, query: { key } })
  const { data: view, refresh } = quote
  const picked = ref<number | null>(null)
  // Follows from the quote, so that server and browser choose alike: what was accepted, else what was picked, else the middle one.
  const chosen = computed<number | null>({
    get: () => {
      const quantities = view.value?.ladder.map(rung => rung.quantity) ?? []
      const kept = view.value?.acceptedQuantity ?? picked.value
      return kept !== null && quantities.includes(kept) ? kept : quantities[Math.floor((quantities.length - 1) / 2)] ?? null
    },
    set: (quantity) => { picked.value = quantity },
  })

  const pay = usePay(() => orderRef)
  const accept = useAct(async () => {
    if (!view.value || chosen.value === null) return
    try {
      const { next } = await send<AcceptedQuote>(`/api/quotes/${orderRef}/accept`, { body: { quantity: chosen.value, version: view.value.version, ...(key && { key }) } })
      if (next === 'pay') await pay.run('deposit')
    }
    finally {
      await refresh()
    }
  })
  const decline = useAct(async (reason: string) => {
    if (!view.value) return
    await send<{ state: OrderState }>(`/api/quotes/${orderRef}/decline`, { body: { version: view.value.version, reason, ...(key && { key }) } })
    await refresh()
  })
  const confirmLink = useAct(async () => {
    await send<{ sent: true }>(`/api/quotes/${orderRef}/confirm-link`, { body: key ? { key } : {} })
  })

  /** Puts what was asked for into the order form, to change something or to ask again. */
  async function change(): Promise<void> {
    if (!view.value) return
    const store = useOrderDraftStore()
    const { draft, written } = draftOfRequirement(view.value.request, store.units)
    store.draft = { ...store.draft, ...draft }
    store.written = written
    store.keep(new Date())
    await navigateTo('/order')
  }

  // The address is confirmed in another tab, from the e-mail: whoever comes back here sees it.
  const look = () => { if (document.visibilityState === 'visible' && view.value?.state === 'accepted') void refresh() }
  onMounted(() => document.addEventListener('visibilitychange', look))
  onScopeDispose(() => { if (import.meta.client) document.removeEventListener('visibilitychange', look) })

  return { quote, view, chosen, rung: computed(() => view.value?.ladder.find(rung => rung.quantity === chosen.value) ?? null), accept, decline, confirmLink, pay, change }
}
