import type { PreviewView } from '#shared/schemas/quote'
import { send, toSendError, type SendError } from '~/utils/send'

const DEBOUNCE_MS = 400
const SLOW_MS = 3000

type PreviewBody = { requirement: Record<string, unknown>, countryCode: string }

/**
 * The spring, its price and its date for what is typed. Asks the server once typing rests; only the answer to the latest
 * question counts. The last good answer stays in `view` while the next one is on its way.
 */
export function useOrderPreview(body: () => PreviewBody | null) {
  const view = shallowRef<PreviewView | null>(null)
  const error = shallowRef<SendError | null>(null)
  const isAsking = ref(false)
  const isSlow = ref(false)
  let controller: AbortController | undefined
  let timer: ReturnType<typeof setTimeout> | undefined
  let asked = ''

  function stop(): void {
    clearTimeout(timer)
    controller?.abort()
    isAsking.value = false
    isSlow.value = false
  }

  async function ask(question: PreviewBody): Promise<void> {
    const own = new AbortController()
    controller = own
    isAsking.value = true
    const slow = setTimeout(() => { if (controller === own) isSlow.value = true }, SLOW_MS)
    try {
      const answer = await send<PreviewView>('/api/order/preview', { body: question, signal: own.signal })
      if (controller !== own) return
      view.value = answer
      error.value = null
    }
    catch (caught) {
      if (controller !== own || own.signal.aborted) return
      error.value = toSendError(caught)
    }
    finally {
      clearTimeout(slow)
      if (controller === own) {
        isAsking.value = false
        isSlow.value = false
      }
    }
  }

  function retry(): void {
    stop()
    const question = body()
    if (question) void ask(question)
  }

  // At once too: whoever comes here from another page brings a draft along.
  watch(() => JSON.stringify(body()), (question) => {
    if (question === asked) return
    asked = question
    stop()
    if (question === 'null') {
      error.value = null
      return
    }
    timer = setTimeout(retry, DEBOUNCE_MS)
  }, { immediate: import.meta.client })
  onScopeDispose(stop)

  return { view, error, isAsking: readonly(isAsking), isSlow: readonly(isSlow), retry }
}
