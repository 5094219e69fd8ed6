import type { BrowserContext, ConsoleMessage, Page, Request, Response } from '@playwright/test'

/** A refusal that a test brings about on purpose. */
type Expected = { status: number, url: RegExp }

/**
 * Listens to every page of a context and keeps what should never happen: an error on the console, a hydration mismatch,
 * a failed request, a request to another machine. A test names the refusals it provokes; everything else fails it.
 */
export class Watch {
  readonly problems: string[] = []
  private readonly expected: Expected[] = []

  constructor(private readonly ownOrigins: readonly string[]) {}

  /** From now on an answer with this status from an address like this is part of the test. */
  expect(status: number, url: RegExp): void {
    this.expected.push({ status, url })
  }

  follow(context: BrowserContext): void {
    context.on('page', page => this.followPage(page))
    for (const page of context.pages()) this.followPage(page)
  }

  private followPage(page: Page): void {
    page.on('console', message => this.hear(message))
    page.on('pageerror', error => this.problems.push(`error in the page ${page.url()}: ${error.message}`))
    page.on('request', request => this.checkOrigin(request))
    page.on('requestfailed', request => this.judgeFailure(request))
    page.on('response', response => this.judge(response))
  }

  private hear(message: ConsoleMessage): void {
    const text = message.text()
    const isMismatch = /hydrat/i.test(text)
    // A refused request is judged by its answer, which has the address and the status.
    if (message.type() === 'error' && /^Failed to load resource/.test(text)) return
    if (message.type() === 'error' || (message.type() === 'warning' && isMismatch)) this.problems.push(`console of ${message.location().url}: ${text}`)
  }

  private checkOrigin(request: Request): void {
    const url = new URL(request.url())
    if (url.protocol === 'data:' || url.protocol === 'blob:' || url.protocol === 'about:') return
    if (!this.ownOrigins.includes(url.origin)) this.problems.push(`request to another machine: ${request.url()}`)
  }

  private judgeFailure(request: Request): void {
    const why = request.failure()?.errorText ?? 'unknown'
    // The page itself gives up a request whose answer it no longer needs: a preview overtaken by the next one, a page that is left.
    if (why !== 'net::ERR_ABORTED') this.problems.push(`failed request: ${request.method()} ${request.url()}: ${why}`)
  }

  private judge(response: Response): void {
    if (response.status() < 400) return
    const isExpected = this.expected.some(({ status, url }) => status === response.status() && url.test(response.url()))
    if (!isExpected) this.problems.push(`answer ${response.status()}: ${response.request().method()} ${response.url()}`)
  }
}
