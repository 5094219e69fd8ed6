import type { HttpAnswer } from '../http'
import { html } from './html'
import type { SafeHtml } from './html'

/** The sentence on every page (FK-8). */
export const NO_MONEY_NOTICE = 'This is a fake for trying things out. No money moves.'

/**
 * A whole page with strict headers: no script, no frame, nothing from elsewhere. `formTargets` are the origins a form may
 * end up at, because browsers hold redirects after a form against the same rule.
 */
export function pageAnswer(page: { status: number, title: string, content: SafeHtml, formTargets?: readonly string[] }): HttpAnswer {
  const markup = html`<!doctype html>
<html lang="en-GB">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="robots" content="noindex">
<title>${page.title} – payment fake</title>
<link rel="stylesheet" href="/c/style.css">
</head>
<body>
<header><p class="notice">${NO_MONEY_NOTICE}</p></header>
<main>
${page.content}
</main>
</body>
</html>
`
  const targets = ['\'self\'', ...(page.formTargets ?? [])].join(' ')
  return {
    status: page.status,
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy': `default-src 'none'; style-src 'self'; form-action ${targets}; base-uri 'none'; frame-ancestors 'none'`,
      'x-frame-options': 'DENY',
      'referrer-policy': 'same-origin',
      'cross-origin-opener-policy': 'same-origin',
      'permissions-policy': 'camera=(), geolocation=(), microphone=(), payment=()',
    },
    body: markup.markup,
  }
}

/** A redirect after a form: the browser fetches the new address with GET. */
export function redirectAnswer(location: string): HttpAnswer {
  return { status: 303, headers: { location, 'referrer-policy': 'same-origin', 'content-type': 'text/plain; charset=utf-8' }, body: 'See the new address.' }
}
