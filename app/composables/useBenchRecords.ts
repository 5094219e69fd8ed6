import type { BenchRecordBody, BenchView } from '#shared/schemas/shop'
import { SendError, send, toSendError } from '~/utils/send'
import { newUuid } from '~/utils/uuid'

type NewRecord = Omit<BenchRecordBody, 'id'>

/**
 * Sends records of one work centre, one at a time. Each carries an id made here: a record whose answer was lost is sent
 * again under the same id and counts once.
 */
export function useBenchRecords(apply: (view: BenchView) => void) {
  const isBusy = ref(false)
  const failed = shallowRef<{ operationId: string, record: BenchRecordBody } | null>(null)
  const error = shallowRef<SendError | null>(null)

  async function post(operationId: string, record: BenchRecordBody): Promise<boolean> {
    if (isBusy.value) return false
    isBusy.value = true
    try {
      apply(await send<BenchView>(`/api/bench/operations/${operationId}/records`, { body: record }))
      failed.value = null
      error.value = null
      return true
    }
    catch (caught) {
      error.value = toSendError(caught)
      // Without an answer nobody knows whether it arrived, so it is kept under its id.
      failed.value = error.value.status === 0 || error.value.status >= 500 ? { operationId, record } : null
      return false
    }
    finally {
      isBusy.value = false
    }
  }

  return {
    isBusy: readonly(isBusy), error, failed,
    record: (operationId: string, record: NewRecord) => post(operationId, { ...record, id: newUuid() }),
    again: () => failed.value ? post(failed.value.operationId, failed.value.record) : Promise.resolve(false),
  }
}
