import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { coveredCodePoints } from './font-coverage'

const resolve = createRequire(import.meta.url).resolve
const fira = (style: string): string => resolve(`@expo-google-fonts/fira-sans/${style}/FiraSans_${style}.ttf`)

const REGULAR = fira('400Regular')
const ITALIC = fira('400Regular_Italic')
const LIGHT = fira('300Light')
const MONO = resolve('@fontsource/fira-mono/files/fira-mono-latin-400-normal.woff')

/** The fonts that a data sheet embeds, by family; bold is the medium weight. */
export const SHEET_FONTS = {
  'Fira Sans': { normal: REGULAR, bold: fira('500Medium'), italics: ITALIC, bolditalics: ITALIC },
  'Fira Sans Light': { normal: LIGHT },
  'Fira Mono': { normal: MONO },
}

/** Fonts that are read once and made lean: symbols, figures and file text need no kerning. */
export const LEAN_FONTS: readonly { readonly path: string; readonly without: readonly string[] }[] = [
  { path: ITALIC, without: ['GPOS'] },
  { path: LIGHT, without: ['GPOS'] },
  { path: MONO, without: [] },
]

/** Every file among them. */
export const SHEET_FONT_FILES: ReadonlySet<string> = new Set(
  Object.values(SHEET_FONTS).flatMap((styles) => Object.values(styles)),
)

let covered: ReadonlySet<number> | null = null

/** Text in letters that the fonts have: an accent that cannot be drawn is left out, any other sign becomes ?. */
export function printable(text: string): string {
  covered ??= coveredCodePoints(readFileSync(REGULAR))
  const known = covered
  return text
    .normalize('NFC')
    .replace(SPACES, '\u00a0')
    .replace(UNUSUAL, (letter) => {
      if (known.has(letter.codePointAt(0)!)) return letter
      const bare = letter.normalize('NFKD')[0]
      return known.has(bare.codePointAt(0)!) ? bare : '?'
    })
}

/** Spaces of other widths than the usual one. */
const SPACES = /[\u2000-\u200a\u202f\u205f\u3000]/g
/** What is beyond the letters that every latin font has; the space of no width only says where a line may break. */
const UNUSUAL = /[^\n\x20-\x7e\u00a0-\u00ff\u200b]/gu

/** Letters that the latin part of Fira Mono has; all others of a text are set in Fira Sans. */
export const MONO_LETTERS = /[\x20-\x7e\u00a0-\u00ac\u00ae-\u00ff–—…−]+/g
