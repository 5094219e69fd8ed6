import { parentPort } from 'node:worker_threads'
import type { ThreadReply } from '../integrations/thread-pool'
import { doSizingJob, type SizingAnswer, type SizingJob } from '../services/springs/sizing-job'

/** The thread that sizes springs: one job in, one answer out. Bundled by vite/bundle-thread.ts. */
parentPort?.on('message', ({ job }: { job: SizingJob }) => {
  parentPort?.postMessage(reply(job))
})

function reply(job: SizingJob): ThreadReply<SizingAnswer> {
  try {
    return { answer: doSizingJob(job) }
  }
  catch (error) {
    return { error: error instanceof Error ? `${error.name}: ${error.message}` : 'The job failed.' }
  }
}
