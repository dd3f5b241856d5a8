import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { coveredCodePoints } from './font-coverage'

const resolve = createRequire(import.meta.url).resolve
const fira = (style: string): string => resolve(`@expo-google-fonts/fira-sans/${style}/FiraSans_${style}.ttf`)

const REGULAR = fira('400Regular')
/** The font of file text: where it is packed, and what it is called unpacked. */
export const MONO_FONT = {
  packed: resolve('@fontsource/fira-mono/files/fira-mono-latin-400-normal.woff'),
  name: 'fira-mono.ttf',
} as const

/** The fonts that a data sheet embeds, by family; bold is the medium weight. */
export const SHEET_FONTS = {
  'Fira Sans': {
    normal: REGULAR,
    bold: fira('500Medium'),
    italics: fira('400Regular_Italic'),
    bolditalics: fira('400Regular_Italic'),
  },
  'Fira Sans Light': { normal: fira('300Light'), italics: fira('300Light_Italic') },
  'Fira Mono': { normal: MONO_FONT.name },
}

/** Every file among them. */
export const SHEET_FONT_FILES: ReadonlySet<string> = new Set(
  Object.values(SHEET_FONTS).flatMap((styles) => Object.values(styles)),
)

let covered: ReadonlySet<number> | null = null

/** Text in letters that the fonts have: an accent that cannot be drawn is left out, any other sign becomes ?. */
export function printable(text: string): string {
  covered ??= coveredCodePoints(readFileSync(REGULAR))
  const known = covered
  return Array.from(text.normalize('NFC').replace(SPACES, '\u00a0'), (letter) => {
    if (known.has(letter.codePointAt(0)!) || letter === '\n') return letter
    const bare = letter.normalize('NFKD')[0]
    return known.has(bare.codePointAt(0)!) ? bare : '?'
  }).join('')
}

/** Spaces of other widths than the usual one. */
const SPACES = /[\u2000-\u200a\u202f\u205f\u3000]/g

/** Letters that the latin part of Fira Mono has; all others of a text are set in Fira Sans. */
export const MONO_LETTERS = /[\x20-\x7e\u00a0-\u00ac\u00ae-\u00ff–—…−]+/g
