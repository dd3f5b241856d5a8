import greekItalic from '@fontsource/fira-sans/files/fira-sans-greek-400-italic.woff2?url'
import greek from '@fontsource/fira-sans/files/fira-sans-greek-400-normal.woff2?url'
import latinItalic from '@fontsource/fira-sans/files/fira-sans-latin-400-italic.woff2?url'
import latin from '@fontsource/fira-sans/files/fira-sans-latin-400-normal.woff2?url'
import signs from '@/assets/fonts/fira-signs-400.woff2?url'

interface PictureFont {
  readonly family: string
  readonly style: 'normal' | 'italic'
  readonly url: string
  /** As in assets/fonts.css: each file only serves the letters it has. */
  readonly range: string | null
}

const GREEK = 'U+370-3FF'
const FONTS: readonly PictureFont[] = [
  { family: 'Fira Sans', style: 'normal', url: latin, range: null },
  { family: 'Fira Sans', style: 'italic', url: latinItalic, range: null },
  { family: 'Fira Sans', style: 'normal', url: greek, range: GREEK },
  { family: 'Fira Sans', style: 'italic', url: greekItalic, range: GREEK },
  { family: 'Fira Signs', style: 'normal', url: signs, range: null },
]

/**
 * The fonts of a picture as rules that hold the files themselves: a picture that the browser draws from a text cannot see the
 * fonts of the page.
 */
export async function pictureFontRules(): Promise<string> {
  return (await Promise.all(FONTS.map(fontRule))).join('')
}

async function fontRule({ family, style, url, range }: PictureFont): Promise<string> {
  const answer = await fetch(url)
  if (!answer.ok) throw new Error(`The font ${url} could not be loaded.`)
  const data = base64(new Uint8Array(await answer.arrayBuffer()))
  const letters = range === null ? '' : `unicode-range:${range};`
  return `@font-face{font-family:'${family}';font-style:${style};${letters}src:url(data:font/woff2;base64,${data})}`
}

function base64(bytes: Uint8Array): string {
  let text = ''
  for (const byte of bytes) text += String.fromCharCode(byte)
  return btoa(text)
}
