import { availableParallelism } from 'node:os'
import source from '#sizing-thread'
import { createThreadPool, ThreadError, type ThreadPool } from '../../integrations/thread-pool'
import { DomainError } from '../errors'
import type { SizingAnswer, SizingAnswerTo, SizingJob } from './sizing-job'

/** One core is left to the server itself. */
const THREADS = Math.max(1, availableParallelism() - 1)
/** At a tenth of a second each this is some seconds of waiting: longer than that people rather ask again. */
const MOST_WAITING = 50
const LONGEST_MS = 15_000
const RETRY_AFTER_S = 3

let pool: ThreadPool<SizingJob, SizingAnswer> | undefined

/** Sizing on threads of its own, so that pages are answered meanwhile. */
export const sizingThreads = {
  /** @throws DomainError unavailable when the queue is full, a thread dies, or the server stops */
  run: async <Job extends SizingJob>(job: Job): Promise<SizingAnswerTo<Job['task']>> => {
    pool ??= createThreadPool<SizingJob, SizingAnswer>({ source, threads: THREADS, mostWaiting: MOST_WAITING, longestMs: LONGEST_MS })
    try {
      // Each task has its own kind of answer: see `doSizingJob`.
      return await pool.run(job) as SizingAnswerTo<Job['task']>
    }
    catch (error) {
      throw error instanceof ThreadError ? refusalFor(error) : error
    }
  },
  close: async (): Promise<void> => {
    await pool?.close()
  },
}

function refusalFor(error: ThreadError): Error {
  switch (error.reason) {
    case 'full': return new DomainError('unavailable', 'Many springs are being worked out at the moment. Try again in a few seconds.', [], RETRY_AFTER_S)
    case 'closed': return new DomainError('unavailable', 'The server is about to stop. Try again in a moment.', [], RETRY_AFTER_S)
    case 'crashed': return new DomainError('unavailable', 'Working out the spring was interrupted. Try again in a moment.', [], RETRY_AFTER_S)
    case 'too-long': return new DomainError('unavailable', 'Working out the spring takes too long at the moment. Try again in a few seconds.', [], RETRY_AFTER_S)
    // A fault of the computing itself is answered and logged as one.
    case 'work': return error
  }
}
