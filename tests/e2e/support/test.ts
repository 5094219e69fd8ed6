import { test as base, expect, type Browser, type BrowserContext, type Page } from '@playwright/test'
import type { Role } from '#shared/schemas/roles'
import type { TestServices } from '../../../scripts/lib/test-shop.mjs'
import { Mailbox } from './mailbox'
import { useTestServices } from './services'
import { Watch } from './watch'

type StorageState = Awaited<ReturnType<BrowserContext['storageState']>>
/** A window of somebody with a role, of nobody, or of the one whose cookies were kept. */
type OpenAs = (who: Role | 'visitor' | StorageState) => Promise<Page>
type Fixtures = { services: TestServices, mailbox: Mailbox, watch: Watch, openAs: OpenAs }

const signInOf = (services: TestServices, role: Role) => {
  const found = services.demoSignIns.find(one => one.role === role)
  if (!found) throw new Error(`There is no demo sign-in for ${role}.`)
  return found
}

/**
 * The test of every browser test: each page that is opened is listened to, and the test fails with what was heard.
 * `openAs` opens a window of somebody's own, signed in.
 */
export const test = base.extend<Fixtures>({
  services: async ({}, use) => { await use(useTestServices()) },
  mailbox: async ({ services }, use) => { await use(new Mailbox(services.mailUrl)) },
  watch: [async ({ services }, use) => {
    const watch = new Watch([services.baseUrl, services.stripeFakeUrl].map(url => new URL(url).origin))
    await use(watch)
    expect(watch.problems, 'what the pages complained of').toEqual([])
  }, { auto: true }],
  context: async ({ context, watch }, use) => {
    watch.follow(context)
    await use(context)
  },
  openAs: async ({ browser, watch, services }, use) => {
    const opened: { close: () => Promise<void> }[] = []
    await use(async (who) => {
      const page = await openWindow(browser, watch, typeof who === 'object' ? who : undefined)
      opened.push(page.context())
      if (typeof who === 'string' && who !== 'visitor') await signIn(page, services, who)
      return page
    })
    for (const context of opened) await context.close()
  },
})

async function openWindow(browser: Browser, watch: Watch, storageState: StorageState | undefined): Promise<Page> {
  const context = await browser.newContext({ storageState })
  watch.follow(context)
  return context.newPage()
}

/** Signs in by the route that the form uses; the form itself has its own test. */
async function signIn(page: Page, services: TestServices, role: Role): Promise<void> {
  const { email, password } = signInOf(services, role)
  const answer = await page.request.post('/api/auth/login', { data: { email, password }, headers: { 'x-wirewright': '1' } })
  expect(answer.status(), `signing in as ${role}`).toBe(200)
}

export { expect }
