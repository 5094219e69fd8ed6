import { hasDemoPeople } from '../services/people/demo-people'

const TRY_AGAIN_MS = 5_000

/** Production does not run on a database of the demonstration, whose sign-ins everybody can read. */
export default defineNitroPlugin(() => {
  if (useSettings().mode !== 'production') return
  const check = async (): Promise<void> => {
    try {
      if (!(await hasDemoPeople(useDatabase()))) return
    }
    catch (error) {
      // Without an answer nobody can sign in either; it is asked again.
      log.error('demo-check', error)
      setTimeout(check, TRY_AGAIN_MS)
      return
    }
    process.stderr.write('Production start refused: the database holds accounts of the demonstration. Use a database of its own.\n')
    process.exit(1)
  }
  void check()
})
