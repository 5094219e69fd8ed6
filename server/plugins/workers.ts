import sizingThread from '#sizing-thread'
import { sizingThreads } from '../services/springs/sizing-threads'

/** How long requests may take to finish after a stop was asked for. */
const FINISH_WITHIN_MS = 10_000

/**
 * Starts the workers of this process, each claiming its work in the database, so that several processes share it. Asked to stop,
 * they take nothing new at once; the server finishes its requests, and then the pool is closed and the process ends.
 */
export default defineNitroPlugin((nitro) => {
  const workers = [outboxWorker, stripeEventWorker]
  for (const worker of workers) worker.start()
  sizingThreads.start(sizingThread)

  // Nitro reads this setting only after its plugins have run; its own default is half a minute.
  process.env.NITRO_SHUTDOWN_TIMEOUT ??= String(FINISH_WITHIN_MS)
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.once(signal, () => {
      log.info('stopping', { signal })
      for (const worker of workers) void worker.stop()
    })
  }
  nitro.hooks.hook('close', async () => {
    await Promise.all([...workers.map(worker => worker.stop()), sizingThreads.close()])
    await closeDatabase()
    log.info('stopped')
  })
})
