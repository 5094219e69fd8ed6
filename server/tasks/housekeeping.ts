import { sweep } from '../services/housekeeping/sweep'

/** Deletes what nobody can use any more. */
export default defineTask({
  meta: { name: 'housekeeping', description: 'Deletes old counters, links, sessions and client keys' },
  async run() {
    const result = await sweep(useDatabase())
    log.info('housekeeping', result)
    return { result }
  },
})
