/** A piece of plain text: an address of the web, or what stands between. */
export interface TextPart {
  readonly text: string
  readonly link: boolean
}

/** Parts a text at its http and https addresses; a full stop or bracket that ends a sentence is no part of one. */
export const textParts = (text: string): TextPart[] =>
  text
    .split(/(https?:\/\/[^\s<>"]*[^\s<>".,;:!?)\]}'])/g)
    .map((part, index) => ({ text: part, link: index % 2 === 1 }))
    .filter((part) => part.text !== '')
