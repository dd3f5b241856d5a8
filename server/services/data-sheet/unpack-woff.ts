import { inflateSync } from 'node:zlib'

const HEADER = { woff: 44, sfnt: 12 } as const
const ENTRY = { woff: 20, sfnt: 16 } as const

/**
 * The TrueType font in a WOFF file (W3C, WOFF 1.0): the same tables, unpacked. The PDF writer reads tables of a packed font anew
 * for each glyph, which takes longer than all else.
 *
 * @throws {Error} when it is no such file
 */
export function unpackWoff(woff: Buffer): Buffer {
  if (woff.toString('latin1', 0, 4) !== 'wOFF') throw new Error('The font is not packed as WOFF.')
  const count = woff.readUInt16BE(12)
  const tables = Array.from({ length: count }, (_, index) => {
    const entry = woff.subarray(HEADER.woff + ENTRY.woff * index)
    const [offset, packed, length] = [4, 8, 12].map((at) => entry.readUInt32BE(at))
    const bytes = woff.subarray(offset, offset + packed)
    return {
      tag: entry.subarray(0, 4),
      sum: entry.subarray(16, 20),
      bytes: packed < length ? inflateSync(bytes) : bytes,
    }
  })
  const directory = Buffer.alloc(HEADER.sfnt + ENTRY.sfnt * count)
  woff.copy(directory, 0, 4, 8)
  directory.writeUInt16BE(count, 4)
  const power = 2 ** Math.floor(Math.log2(count))
  directory.writeUInt16BE(16 * power, 6)
  directory.writeUInt16BE(Math.log2(power), 8)
  directory.writeUInt16BE(16 * (count - power), 10)
  const parts: Buffer[] = [directory]
  let at = directory.length
  tables.forEach(({ tag, sum, bytes }, index) => {
    const entry = HEADER.sfnt + ENTRY.sfnt * index
    tag.copy(directory, entry)
    sum.copy(directory, entry + 4)
    directory.writeUInt32BE(at, entry + 8)
    directory.writeUInt32BE(bytes.length, entry + 12)
    // Tables begin at multiples of four bytes.
    parts.push(bytes, Buffer.alloc(-bytes.length & 3))
    at += bytes.length + (-bytes.length & 3)
  })
  return Buffer.concat(parts)
}
