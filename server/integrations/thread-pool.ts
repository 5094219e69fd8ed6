import { Worker } from 'node:worker_threads'

/** Why a job was not done; `work` is an error of the job itself, the others are the pool's. */
export type ThreadFailure = 'full' | 'crashed' | 'too-long' | 'closed' | 'work'

export class ThreadError extends Error {
  constructor(readonly reason: ThreadFailure, message: string) {
    super(message)
    this.name = 'ThreadError'
  }
}

export type ThreadPoolOptions = {
  /** Source of the thread, CommonJS: it answers each message `{ job }` with one `{ answer }` or `{ error }`. */
  source: string
  threads: number
  /** Jobs that may wait beside those in hand. */
  mostWaiting: number
  /** A job that takes longer is ended with its thread. */
  longestMs: number
  /** Memory of a thread, MiB: one that needs more ends with its job, and the server goes on. */
  mostMemoryMib: number
}

export type ThreadPool<Job, Answer> = {
  /** @throws ThreadError */
  run(job: Job): Promise<Answer>
  /** Ends the threads; what waits or runs is refused. The pool starts no thread any more. */
  close(): Promise<void>
}

export type ThreadReply<Answer> = { answer: Answer } | { error: string }

type Task<Job, Answer> = { job: Job, resolve: (answer: Answer) => void, reject: (error: ThreadError) => void }
type Thread<Job, Answer> = { worker: Worker, task: Task<Job, Answer> | null, timer: NodeJS.Timeout | undefined }

/**
 * Threads that do one job each at a time, and a queue of bounded length before them. Threads are started when first needed
 * and kept; one that dies takes only its own job with it, and another is started for the next.
 */
export function createThreadPool<Job, Answer>({ source, threads: mostThreads, mostWaiting, longestMs, mostMemoryMib }: ThreadPoolOptions): ThreadPool<Job, Answer> {
  const threads = new Set<Thread<Job, Answer>>()
  const waiting: Task<Job, Answer>[] = []
  let isClosed = false

  function startThread(): Thread<Job, Answer> {
    const worker = new Worker(source, { eval: true, resourceLimits: { maxOldGenerationSizeMb: mostMemoryMib } })
    const thread: Thread<Job, Answer> = { worker, task: null, timer: undefined }
    threads.add(thread)
    // An idle thread keeps no process alive.
    worker.unref()
    worker.on('message', (reply: ThreadReply<Answer>) => {
      const task = release(thread)
      if ('answer' in reply) task?.resolve(reply.answer)
      else task?.reject(new ThreadError('work', reply.error))
      giveWork()
    })
    worker.on('error', error => drop(thread, new ThreadError('crashed', `A thread ended: ${error.message}`)))
    worker.on('exit', code => drop(thread, isClosed ? new ThreadError('closed', 'The threads are closed') : new ThreadError('crashed', `A thread ended with code ${code}`)))
    return thread
  }

  function release(thread: Thread<Job, Answer>): Task<Job, Answer> | null {
    const { task } = thread
    clearTimeout(thread.timer)
    thread.task = null
    thread.worker.unref()
    return task
  }

  function drop(thread: Thread<Job, Answer>, error: ThreadError): void {
    threads.delete(thread)
    release(thread)?.reject(error)
    giveWork()
  }

  function giveWork(): void {
    while (!isClosed && waiting.length > 0) {
      const thread = [...threads].find(({ task }) => task === null) ?? (threads.size < mostThreads ? startThread() : undefined)
      if (!thread) return
      const task = waiting.shift()
      if (!task) return
      thread.task = task
      thread.worker.ref()
      thread.timer = setTimeout(() => {
        drop(thread, new ThreadError('too-long', `A job took longer than ${longestMs} ms`))
        void thread.worker.terminate()
      }, longestMs)
      thread.worker.postMessage({ job: task.job })
    }
  }

  return {
    run: job => new Promise((resolve, reject) => {
      if (isClosed) return reject(new ThreadError('closed', 'The threads are closed'))
      const busy = [...threads].filter(({ task }) => task !== null).length
      if (waiting.length >= mostWaiting && busy >= mostThreads) return reject(new ThreadError('full', `${waiting.length} jobs wait already`))
      waiting.push({ job, resolve, reject })
      giveWork()
    }),
    close: async () => {
      isClosed = true
      for (const task of waiting.splice(0)) task.reject(new ThreadError('closed', 'The threads are closed'))
      await Promise.all([...threads].map(({ worker }) => worker.terminate()))
    },
  }
}
