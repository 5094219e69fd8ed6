import { describe, expect, it } from 'vitest'
import { MAIL_KINDS } from '../../../emails/payloads'
import { previewOrder, previewQuote, previewUrls } from '../../../emails/parts/preview'
import { renderMail, renderPreview } from '../../../emails/render'
import { toText } from '../../../emails/to-text'

const sendTime = { linkUrl: 'https://oxmere.example/link/secret', timeZone: 'Europe/Dublin' }
const luminance = (hex: string) => {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map(at => Number.parseInt(hex.slice(at, at + 2), 16) / 255).map(c => c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4)
  return 0.2126 * r + 0.7152 * g + 0.0722 * b
}
/** WCAG 2.2, success criterion 1.4.3: (L1 + 0.05) / (L2 + 0.05). */
const contrast = (one: string, other: string) => {
  const [light = 0, dark = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a)
  return (light + 0.05) / (dark + 0.05)
}

describe.each(MAIL_KINDS)('the mail %s', (kind) => {
  it('is whole in HTML and text, from one source, with at most one thing to do (MAIL-6)', async () => {
    const { subject, html, text } = await renderPreview(kind, 'Europe/Dublin')
    expect(subject).not.toBe('')
    expect(html).toMatch(/^<!doctype html>\n<html lang="en-GB">/)
    expect(html).toContain('<title>')
    expect(html.match(/<h1/g)).toHaveLength(1)
    expect(html).not.toMatch(/<!--|<style|<script|<img|class=|https?:\/\/(?!oxmere\.example\/)/)
    const links = [...html.matchAll(/<a href="([^"]*)"/g)].map(match => match[1]!.replaceAll('&amp;', '&'))
    expect(links.length).toBeLessThanOrEqual(1)
    for (const link of links) expect(text).toContain(`:\n${link}`)
    // Every word of the HTML stands in the text as well.
    const words = (value: string) => value.match(/[\p{L}\p{N}€.]{2,}/gu) ?? []
    const seen = new Set(words(text))
    const body = html.slice(html.indexOf('<body')).replace(/<[^>]+>/g, ' ').replace(/&[a-z#0-9]+;/g, ' ')
    expect(words(body).filter(word => !seen.has(word) && !seen.has(word.replace(/\.$/, '')))).toEqual([])
    expect(text).not.toMatch(/undefined|null|NaN|\[object|<|&amp;/)
  })

  it('is readable: no text under 14 px, contrast of at least 4.5 to 1, layout tables marked as such', async () => {
    const { html } = await renderPreview(kind, 'Europe/Dublin')
    for (const [, size] of html.matchAll(/font-size: ?(\d+)px/g)) expect(Number(size)).toBeGreaterThanOrEqual(14)
    for (const [, colour] of html.matchAll(/[; "]color: ?(#[0-9A-F]{6})/gi)) {
      // The one light text stands on the button.
      const ground = colour!.toUpperCase() === '#FDFDFB' ? '#1D4A76' : '#FDFDFB'
      expect(contrast(colour!, ground)).toBeGreaterThanOrEqual(4.5)
    }
    const tables = html.split('<table').slice(1)
    expect(tables.length).toBeGreaterThan(1)
    for (const table of tables) expect(/^[^>]*role="presentation"/.test(table) || table.includes('<th scope=')).toBe(true)
  })

  it('says nothing of cost or margin (MAIL-13)', async () => {
    const { html, text } = await renderPreview(kind, 'Europe/Dublin')
    expect(html + text).not.toMatch(/margin(?!:)|overhead|cost price|mark-?up/i)
  })
})

describe('words of the customer', () => {
  it('stand in the mail as text, whatever they are (S-1)', async () => {
    const title = '<img src=x onerror=alert(1)> & "quotes"'
    const { html, text, subject } = await renderMail('enquiry-received', { ...previewOrder, title, quoteUrl: previewUrls.quoteUrl }, sendTime)
    expect(html).not.toContain('<img')
    expect(html).toContain('&lt;img src=x onerror=alert(1)&gt; &amp;')
    expect(text).toContain(`“${title}”`)
    expect(subject).toContain(title)
  })

  it('cannot make a second header of the subject, or an endless one (S-8, MAIL-10)', async () => {
    const { subject } = await renderMail('enquiry-received', { ...previewOrder, title: `a\r\nBcc: b@c.example\u2028${'x'.repeat(500)}`, quoteUrl: previewUrls.quoteUrl }, sendTime)
    expect(subject).not.toMatch(/[\r\n\u2028]/)
    expect(subject.length).toBeLessThanOrEqual(180)
  })
})

describe('what a mail says', () => {
  it('follows the sums: a balance is asked for only while there is one', async () => {
    const finished = { ...previewOrder, quantity: 1, currency: 'eur', orderUrl: previewUrls.orderUrl }
    const due = await renderMail('job-finished', { ...finished, balanceMinor: 35_424 }, sendTime)
    expect(due.text).toMatch(/€354\.24 is due now/)
    expect(due.text).toContain('1 spring.')
    const paid = await renderMail('job-finished', { ...finished, balanceMinor: 0 }, sendTime)
    expect(paid.text).toMatch(/everything is paid/i)
    expect(paid.text + paid.subject).not.toMatch(/due|€/)
  })

  it('has the rungs of a quote in rows, and times in the shop’s zone', async () => {
    const quote = await renderMail('quote-ready', previewQuote, sendTime)
    expect(quote.text).toContain('500 | €0.960 | €590.40')
    const waits = { ...previewOrder, quoteUrl: previewUrls.quoteUrl, reasons: ['A reason.'], answerBy: '2026-07-10T16:00:00Z' }
    expect((await renderMail('enquiry-waits', waits, sendTime)).text).toContain('Friday 10 July 2026, 17:00')
    expect((await renderMail('enquiry-waits', { ...waits, answerBy: null }, sendTime)).text).not.toContain('You have our answer by')
  })

  it('carries the link that is made at sending', async () => {
    const { text, html } = await renderMail('sign-in-link', { name: 'Aoife' }, sendTime)
    expect(text).toContain('\nhttps://oxmere.example/link/secret\n')
    expect(html).toContain('href="https://oxmere.example/link/secret"')
  })

  it('is refused when the payload is not the kind’s', async () => {
    await expect(renderMail('job-planned', { ...previewOrder, leavesOn: 'soon', orderUrl: previewUrls.orderUrl }, sendTime)).rejects.toThrow()
    await expect(renderMail('job-planned', { ...previewOrder, leavesOn: '2026-12-14', orderUrl: 'javascript:alert(1)' }, sendTime)).rejects.toThrow()
    await expect(renderMail('deposit-received', { ...previewOrder, quantity: 1, amountMinor: 1.5, balanceMinor: 0, currency: 'eur', orderUrl: previewUrls.orderUrl }, sendTime)).rejects.toThrow()
    await expect(renderMail('deposit-received', { ...previewOrder, quantity: 1, amountMinor: 1, balanceMinor: 0, currency: 'xxx', orderUrl: previewUrls.orderUrl }, sendTime)).rejects.toThrow()
  })
})

describe('plain text from our HTML', () => {
  it('keeps paragraphs, lists, facts and links apart', () => {
    const html = '<table role="presentation"><tr><td><h1>Head</h1><p>One &amp;  two</p><ul><li>a</li><li>b</li></ul><table><tr><th scope="row" align="left">Key</th><td>Value</td></tr></table><a href="https://a.example/?x=1&amp;y=2">Go</a></td></tr></table>'
    expect(toText(html)).toBe('Head\n\nOne & two\n\n- a\n- b\n\nKey: Value\n\nGo:\nhttps://a.example/?x=1&y=2\n')
  })
})
