import type { OrderStatusView } from '#shared/schemas/quote'
import type { PaymentStatus } from '#shared/schemas/payment'
import { send } from '~/utils/send'

const POLL_MS = [1000, 1500, 2000, 3000, 4000, 5000] as const
const GIVE_UP_AFTER_MS = 120_000

/**
 * An order as its customer follows it. Coming back from the payment page, the server is asked until the payment is settled one way or
 * the other: what the address says is only a hint of which payment to ask for, never believed.
 */
export function useOrderStatus(orderRef: string, sessionId: string | undefined) {
  const order = useFetch<OrderStatusView>(`/api/orders/${orderRef}`, { key: `order-${orderRef}` })
  const { refresh } = order
  const payment = shallowRef<PaymentStatus | null>(null)
  const isConfirming = ref(sessionId !== undefined)
  const hasGivenUp = ref(false)
  let timer: ReturnType<typeof setTimeout> | undefined

  const isSettled = ({ state }: PaymentStatus) => state === 'paid' || state === 'failed' || state === 'expired' || state === 'none'

  async function ask(attempt: number, since: number): Promise<void> {
    try {
      payment.value = await send<PaymentStatus>(`/api/orders/${orderRef}/payment`, { method: 'GET', query: { session_id: sessionId } })
    }
    catch {
      payment.value = null
    }
    if (payment.value && isSettled(payment.value)) {
      isConfirming.value = false
      await refresh()
      return
    }
    if (Date.now() - since > GIVE_UP_AFTER_MS) {
      isConfirming.value = false
      hasGivenUp.value = true
      return
    }
    timer = setTimeout(() => void ask(attempt + 1, since), POLL_MS[Math.min(attempt, POLL_MS.length - 1)])
  }
  function confirm(): void {
    clearTimeout(timer)
    isConfirming.value = true
    hasGivenUp.value = false
    void ask(0, Date.now())
  }
  onMounted(() => { if (sessionId !== undefined) confirm() })
  onScopeDispose(() => clearTimeout(timer))

  return { order, payment, isConfirming: readonly(isConfirming), hasGivenUp: readonly(hasGivenUp), confirm }
}
