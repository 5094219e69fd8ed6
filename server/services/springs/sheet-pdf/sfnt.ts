import { inflateSync } from 'node:zlib'

const WOFF = 0x774F4646
const WOFF_HEADER = 44
const WOFF_ENTRY = 20
const SFNT_HEADER = 12
const SFNT_ENTRY = 16

const padded = (length: number): number => (length + 3) & ~3

/**
 * A font of the form WOFF 1.0 unpacked to plain OpenType, table by table (W3C, WOFF File Format 1.0, sections 3 to 5). The PDF
 * library would unpack each table again for every document, in plain script: half of a sheet's time. Throws for other files.
 */
export function unpackWoff(woff: Buffer): Buffer {
  if (woff.length < WOFF_HEADER || woff.readUInt32BE(0) !== WOFF) throw new Error('This font is no WOFF 1.0 file.')
  const count = woff.readUInt16BE(12)
  const tables = Array.from({ length: count }, (_, i) => {
    const at = WOFF_HEADER + i * WOFF_ENTRY
    const [offset, packedLength, length] = [woff.readUInt32BE(at + 4), woff.readUInt32BE(at + 8), woff.readUInt32BE(at + 12)]
    const packed = woff.subarray(offset, offset + packedLength)
    const data = packedLength < length ? inflateSync(packed) : packed
    if (data.length !== length) throw new Error('A table of this font has not the length that its directory says.')
    return { tag: woff.readUInt32BE(at), checksum: woff.readUInt32BE(at + 16), data }
  })
  const sfnt = Buffer.alloc(SFNT_HEADER + count * SFNT_ENTRY + tables.reduce((sum, { data }) => sum + padded(data.length), 0))
  const power = Math.floor(Math.log2(count))
  sfnt.writeUInt32BE(woff.readUInt32BE(4), 0)
  sfnt.writeUInt16BE(count, 4)
  sfnt.writeUInt16BE(16 * 2 ** power, 6)
  sfnt.writeUInt16BE(power, 8)
  sfnt.writeUInt16BE(16 * count - 16 * 2 ** power, 10)
  let offset = SFNT_HEADER + count * SFNT_ENTRY
  tables.forEach(({ tag, checksum, data }, i) => {
    const at = SFNT_HEADER + i * SFNT_ENTRY
    sfnt.writeUInt32BE(tag, at)
    sfnt.writeUInt32BE(checksum, at + 4)
    sfnt.writeUInt32BE(offset, at + 8)
    sfnt.writeUInt32BE(data.length, at + 12)
    data.copy(sfnt, offset)
    offset += padded(data.length)
  })
  return sfnt
}
