import { sweep } from '../services/housekeeping/sweep'
import { claimRun } from '../services/limits/count'

const EVERY_S = 3_600

/** Deletes what nobody can use any more. Of several processes one does it. */
export default defineTask({
  meta: { name: 'housekeeping', description: 'Deletes old counters, links, sessions and client keys' },
  async run() {
    if (!(await claimRun(useDatabase(), 'housekeeping', EVERY_S))) return { result: null }
    const result = await sweep(useDatabase())
    log.info('housekeeping', result)
    return { result }
  },
})
