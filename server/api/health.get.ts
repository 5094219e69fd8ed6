import journal from '../../drizzle/meta/_journal.json'
import { DomainError } from '../services/errors'
import { checkReady } from '../services/health/check'

/** Readiness: the database answers and has every migration of this build. */
export default defineRoute({ access: 'public' }, async ({ context }) => {
  try {
    await checkReady(context.db, { migrations: journal.entries.length })
  }
  catch (error) {
    log.error('not-ready', error)
    throw new DomainError('unavailable', 'Not ready.', [], 2)
  }
  return { status: 'ok' }
})
