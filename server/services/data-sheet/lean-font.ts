import { inflateSync } from 'node:zlib'

/** A table of a font, as its directory lists it. */
interface FontTable {
  readonly tag: string
  readonly checksum: number
  readonly bytes: Buffer
}

const SFNT = { header: 12, entry: 16 } as const
const WOFF = { signature: 'wOFF', header: 44, entry: 20 } as const

/**
 * A TrueType font with some of its tables left out; one in a WOFF file (W3C, WOFF 1.0) is unpacked. The PDF writer reads tables of
 * a packed font anew for each glyph and decodes kerning for each document, which takes longer than all else.
 *
 * @param without tags of tables, such as GPOS for kerning
 */
export function leanFont(font: Buffer, without: readonly string[] = []): Buffer {
  const packed = font.toString('latin1', 0, 4) === WOFF.signature
  const tables = packed ? woffTables(font) : sfntTables(font)
  const flavour = font.readUInt32BE(packed ? 4 : 0)
  return sfnt(
    flavour,
    tables.filter(({ tag }) => !without.includes(tag)),
  )
}

function sfntTables(font: Buffer): FontTable[] {
  return Array.from({ length: font.readUInt16BE(4) }, (_, index) => {
    const entry = SFNT.header + SFNT.entry * index
    const [checksum, offset, length] = [4, 8, 12].map((at) => font.readUInt32BE(entry + at))
    return { tag: tagAt(font, entry), checksum, bytes: font.subarray(offset, offset + length) }
  })
}

function woffTables(font: Buffer): FontTable[] {
  return Array.from({ length: font.readUInt16BE(12) }, (_, index) => {
    const entry = WOFF.header + WOFF.entry * index
    const [offset, packed, length, checksum] = [4, 8, 12, 16].map((at) => font.readUInt32BE(entry + at))
    const bytes = font.subarray(offset, offset + packed)
    return { tag: tagAt(font, entry), checksum, bytes: packed < length ? inflateSync(bytes) : bytes }
  })
}

function sfnt(flavour: number, tables: readonly FontTable[]): Buffer {
  const count = tables.length
  const power = Math.floor(Math.log2(count))
  const directory = Buffer.alloc(SFNT.header + SFNT.entry * count)
  directory.writeUInt32BE(flavour, 0)
  const search = [count, 16 * 2 ** power, power, 16 * (count - 2 ** power)]
  search.forEach((value, index) => directory.writeUInt16BE(value, 4 + 2 * index))
  const parts: Buffer[] = [directory]
  let offset = directory.length
  tables.forEach(({ tag, checksum, bytes }, index) => {
    const entry = SFNT.header + SFNT.entry * index
    directory.write(tag, entry, 'latin1')
    const numbers = [checksum, offset, bytes.length]
    numbers.forEach((value, field) => directory.writeUInt32BE(value, entry + 4 + 4 * field))
    // Tables begin at multiples of four bytes.
    const padding = Buffer.alloc(-bytes.length & 3)
    parts.push(bytes, padding)
    offset += bytes.length + padding.length
  })
  return Buffer.concat(parts)
}

const tagAt = (font: Buffer, entry: number): string => font.toString('latin1', entry, entry + 4)
