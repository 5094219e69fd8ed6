/** Markup that is safe to put into a page as it is. */
export class SafeHtml {
  readonly markup: string
  constructor(markup: string) { this.markup = markup }
}

type Part = string | number | SafeHtml | null | readonly SafeHtml[]

/** Text with the characters that mean something in HTML written out. */
export function escapeHtml(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;').replaceAll('\'', '&#39;')
}

function render(part: Part): string {
  if (part === null) return ''
  if (part instanceof SafeHtml) return part.markup
  if (typeof part === 'object') return part.map(item => item.markup).join('')
  return escapeHtml(String(part))
}

/** Template tag: every value is escaped unless it is markup already; null writes nothing. */
export function html(strings: TemplateStringsArray, ...parts: Part[]): SafeHtml {
  return new SafeHtml(strings.reduce((page, piece, index) => page + render(parts[index - 1] ?? null) + piece))
}
