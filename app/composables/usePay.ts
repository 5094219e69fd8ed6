import type { OpenedPayment, PaymentKind } from '#shared/schemas/payment'
import { send } from '~/utils/send'

/** Opens the payment of an order and goes to the payment page. Paying twice from here leads to the same page. */
export function usePay(orderRef: () => string) {
  return useAct(async (kind: PaymentKind) => {
    const { url } = await send<OpenedPayment>(`/api/orders/${orderRef()}/pay`, { body: { kind } })
    await navigateTo(url, { external: true })
    // The page is left as soon as the browser has the answer; until then the button stays busy.
    await new Promise(resolve => setTimeout(resolve, 4000))
  })
}
