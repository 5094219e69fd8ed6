import type { SheetFonts } from '../services/springs/sheet-pdf'
import { unpackWoff } from '../services/springs/sheet-pdf/sfnt'

let kept: Promise<SheetFonts> | undefined

async function read(name: string): Promise<Buffer> {
  const raw: unknown = await useStorage('assets:server').getItemRaw(`fonts:${name}.woff`)
  if (!(raw instanceof Uint8Array)) throw new Error(`The font ${name} is not among the server's files.`)
  return unpackWoff(Buffer.from(raw))
}

/** The fonts of printed sheets, read and unpacked once. A failed reading is tried again. */
export function useSheetFonts(): Promise<SheetFonts> {
  kept ??= Promise.all([read('work-sans-latin-400-normal'), read('work-sans-latin-600-normal'), read('noto-sans-greek-400-normal')])
    .then(([regular, bold, greek]) => ({ regular, bold, greek }))
  kept.catch(() => { kept = undefined })
  return kept
}
