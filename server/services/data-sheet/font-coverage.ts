/** Platform and encoding of a Unicode map, and the formats of one that is read. */
const UNICODE = { platforms: [0, 3], segments: 4, groups: 12 } as const

/**
 * The code points that a TrueType font has glyphs for, from its cmap table (formats 4 and 12 of the OpenType specification).
 *
 * @param font the bytes of a .ttf file
 */
export function coveredCodePoints(font: Buffer): Set<number> {
  const tables = font.readUInt16BE(4)
  const records = Array.from({ length: tables }, (_, index) => 12 + 16 * index)
  const record = records.find((at) => font.toString('latin1', at, at + 4) === 'cmap')
  if (record === undefined) throw new Error('The font has no map of characters.')
  const cmap = font.readUInt32BE(record + 8)
  const covered = new Set<number>()
  for (let index = 0; index < font.readUInt16BE(cmap + 2); index++) {
    const entry = cmap + 4 + 8 * index
    if (!UNICODE.platforms.some((platform) => platform === font.readUInt16BE(entry))) continue
    const table = cmap + font.readUInt32BE(entry + 4)
    const format = font.readUInt16BE(table)
    if (format === UNICODE.segments) addSegments(font, table, covered)
    if (format === UNICODE.groups) addGroups(font, table, covered)
  }
  return covered
}

function addSegments(font: Buffer, table: number, covered: Set<number>): void {
  const size = font.readUInt16BE(table + 6)
  const [ends, starts] = [table + 14, table + 16 + size]
  const [deltas, offsets] = [starts + size, starts + 2 * size]
  for (let at = 0; at < size; at += 2) {
    const [start, end] = [font.readUInt16BE(starts + at), font.readUInt16BE(ends + at)]
    const [delta, offset] = [font.readUInt16BE(deltas + at), font.readUInt16BE(offsets + at)]
    for (let code = start; code <= end && code < 0xffff; code++) {
      const index = offset === 0 ? code : font.readUInt16BE(offsets + at + offset + 2 * (code - start))
      const glyph = index === 0 ? 0 : (index + delta) & 0xffff
      if (glyph !== 0) covered.add(code)
    }
  }
}

function addGroups(font: Buffer, table: number, covered: Set<number>): void {
  const groups = font.readUInt32BE(table + 12)
  for (let group = 0; group < groups; group++) {
    const at = table + 16 + 12 * group
    const [start, end, first] = [0, 4, 8].map((field) => font.readUInt32BE(at + field))
    for (let code = start; code <= end; code++) if (first + code - start !== 0) covered.add(code)
  }
}
