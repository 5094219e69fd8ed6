/** Starts the workers of this process; each claims its work in the database, so that several processes share it. */
export default defineNitroPlugin((nitro) => {
  outboxWorker.start()
  stripeEventWorker.start()
  nitro.hooks.hook('close', async () => {
    await Promise.all([outboxWorker.stop(), stripeEventWorker.stop()])
    await closeDatabase()
  })
})
