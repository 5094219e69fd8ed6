import { startStripeFake } from './index'
import { readEnvironment } from './config'

/**
 * Runs the payment fake as a process of its own: `npx tsx tests/fakes/stripe/main.ts`.
 * Settings come from the environment (STRIPE_FAKE_PORT, _HOST, _SECRET_KEY, _WEBHOOK_URL, _WEBHOOK_SECRET, _STATE_FILE,
 * _SETTLE_MS). Prints one line when it listens; ends on SIGTERM or SIGINT with the state written.
 */
async function main(): Promise<void> {
  const running = await startStripeFake({ ...readEnvironment(process.env), log: line => process.stderr.write(`${line}\n`) })
  const stop = () => void running.close().then(() => process.exit(0))
  process.once('SIGTERM', stop)
  process.once('SIGINT', stop)
  process.stdout.write(`Payment fake (no money moves) listening on ${running.url}\n`)
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
  process.exit(1)
})
