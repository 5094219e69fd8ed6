import { availableParallelism } from 'node:os'
import { createThreadPool, ThreadError, type ThreadPool } from '../../integrations/thread-pool'
import { DomainError } from '../errors'
import { doSizingJob, type SizingAnswer, type SizingAnswerTo, type SizingJob } from './sizing-job'

/** One core is left to the server itself. */
const THREADS = Math.max(1, availableParallelism() - 1)
/** At a tenth of a second each this is some seconds of waiting: longer than that people rather ask again. */
const MOST_WAITING = 50
const LONGEST_MS = 15_000
const MOST_MEMORY_MIB = 512
const RETRY_AFTER_S = 3

let pool: ThreadPool<SizingJob, SizingAnswer> | undefined

/** Sizing on threads of its own where the server has started them, so that pages are answered meanwhile; else at once, as in the seed. */
export const sizingThreads = {
  /** `source` is the thread's own, bundled: see vite/bundle-thread.ts. */
  start: (source: string): void => {
    pool ??= createThreadPool({ source, threads: THREADS, mostWaiting: MOST_WAITING, longestMs: LONGEST_MS, mostMemoryMib: MOST_MEMORY_MIB })
  },
  /** @throws DomainError unavailable when the queue is full, a thread dies, or the server stops */
  run: async <Job extends SizingJob>(job: Job): Promise<SizingAnswerTo<Job['task']>> => {
    try {
      // Each task has its own kind of answer: see `doSizingJob`.
      return await (pool ? pool.run(job) : doSizingJob(job)) as SizingAnswerTo<Job['task']>
    }
    catch (error) {
      throw error instanceof ThreadError ? refusalFor(error) : error
    }
  },
  close: async (): Promise<void> => {
    await pool?.close()
  },
}

const REFUSALS = {
  'full': 'Many springs are being worked out at the moment. Try again in a few seconds.',
  'closed': 'The server is about to stop. Try again in a moment.',
  'crashed': 'Working out the spring was interrupted. Try again in a moment.',
  'too-long': 'Working out the spring takes too long at the moment. Try again in a few seconds.',
} as const

function refusalFor(error: ThreadError): Error {
  // A fault of the computing itself is answered and logged as one.
  return error.reason === 'work' ? error : new DomainError('unavailable', REFUSALS[error.reason], [], RETRY_AFTER_S)
}
