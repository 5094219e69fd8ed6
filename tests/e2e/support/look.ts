import { AxeBuilder } from '@axe-core/playwright'
import { expect, type Page } from '@playwright/test'

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']
const WIDTHS = [1280, 360]
/** The width at which nothing may scroll sideways but a table in its own frame (WCAG 1.4.10). */
const NARROWEST = 320
const FOLDER = new URL('../screenshots/', import.meta.url).pathname

/** Looks at a page as it stands: at both widths a picture of it and no violation of WCAG A or AA; at 320 px no sideways scrolling. */
export async function look(page: Page, name: string): Promise<void> {
  const before = page.viewportSize() ?? { width: 1280, height: 900 }
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 900 })
    await settle(page)
    await page.screenshot({ path: `${FOLDER}${name}-${width}.png`, fullPage: true })
    expect(await violations(page), `${name} at ${width} px`).toEqual([])
  }
  await page.setViewportSize({ width: NARROWEST, height: 600 })
  await settle(page)
  expect(await sidewaysPx(page), `${name} scrolls sideways at ${NARROWEST} px`).toBe(0)
  await page.setViewportSize(before)
}

async function settle(page: Page): Promise<void> {
  await page.evaluate(async () => {
    await document.fonts.ready
    // Two frames: one for the layout at the new width, one for what a resize observer changed.
    await new Promise(resolve => requestAnimationFrame(() => requestAnimationFrame(resolve)))
  })
}

async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page }).withTags(RULES).analyze()
  return found.flatMap(rule => rule.nodes.map(node => `${rule.id}: ${node.target.join(' ')}: ${node.failureSummary ?? rule.help}`))
}

function sidewaysPx(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
}
