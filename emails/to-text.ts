const ENTITIES: Readonly<Record<string, string>> = { '&amp;': '&', '&lt;': '<', '&gt;': '>', '&quot;': '"', '&#39;': '\'' }
const decode = (text: string) => text.replace(/&(?:amp|lt|gt|quot|#39);/g, entity => ENTITIES[entity] ?? entity)
const TOKEN = /<(\/?)([a-z][a-z0-9]*)((?:[^>"]|"[^"]*")*)>|([^<]+)/g
/** Stands for a line end that is meant, while white space is folded; no keyboard writes it. */
const LINE_END = '\uE000'

/**
 * The plain text of a mail, from the HTML that our own parts render: headings, paragraphs, lists, links, tables of facts. It is
 * no reader of foreign HTML. A link stands as its words and its address on the next line.
 */
export function toText(html: string): string {
  const blocks: string[] = []
  let line = ''
  let href = ''
  let afterCell = ''
  // Layout tables only hold blocks; the cells of the others belong on one line.
  const isDataTable: boolean[] = []
  const endLine = (before = '', after = '') => {
    const text = line.replace(/[^\S\u202F]+/g, ' ').trim().replaceAll(LINE_END, '\n')
    if (text) blocks.push(before + text + after)
    line = ''
  }
  for (const [, close, tag = '', attributes = '', text] of html.matchAll(TOKEN)) {
    if (text !== undefined) line += decode(text)
    else if (tag === 'table') {
      endLine()
      if (close) {
        isDataTable.pop()
        blocks.push('')
      }
      else isDataTable.push(!attributes.includes('role="presentation"'))
    }
    else if (tag === 'a') {
      if (close) line = `${line.trimEnd()}:${LINE_END}${href}`
      else href = decode(/href="([^"]*)"/.exec(attributes)?.[1] ?? '')
    }
    else if (tag === 'h1' || tag === 'p') endLine('', '\n')
    else if (tag === 'li') endLine('- ')
    else if (tag === 'ul') blocks.push('')
    else if (tag === 'tr') endLine()
    else if (tag === 'th' && !close) afterCell = attributes.includes('scope="row" align="left"') ? ': ' : ' | '
    else if ((tag === 'th' || tag === 'td') && close) {
      if (isDataTable.at(-1)) line += afterCell
      else endLine()
    }
  }
  endLine()
  return `${blocks.map(block => block.replace(/(?: \||:)$/, '')).join('\n').replace(/\n{3,}/g, '\n\n').trim()}\n`
}
