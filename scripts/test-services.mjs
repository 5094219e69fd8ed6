// Holds the throw-away services of one test run. It is forked by tests/support/launch.ts, tells it the addresses, and stops
// everything when that process says so, ends, or is killed: the channel between the two then closes.
// Usage: fork('scripts/test-services.mjs', ['api'])
import { startTestShop } from './lib/test-shop.mjs'
import { describeFailure } from './lib/say.mjs'

/** @param {object} message */
function tell(message) {
  if (process.connected) process.send?.(message)
}

async function main() {
  if (!process.send) throw new Error('Started by hand: this program is a part of the tests. Run npm test.')
  const shop = startTestShop(process.argv[2] ?? 'by-hand')
  let isStopping = false
  const stop = async () => {
    if (isStopping) return
    isStopping = true
    await shop.stop()
    process.exit()
  }
  process.once('disconnect', stop)
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.once(signal, stop)
  try {
    tell({ services: await shop.ready })
  } catch (failure) {
    tell({ failure: describeFailure(failure) })
    process.exitCode = 1
    await stop()
  }
}

await main()
