import { onScopeDispose, watchEffect } from 'vue'

/**
 * Sets A4 with the margins of a sheet and a line at the foot of each printed page, with the page's number, for as long as the
 * calling component is there. Browsers that know no page margin boxes print without the line.
 */
export function usePrintFoot(text: () => string): void {
  const style = document.createElement('style')
  document.head.append(style)
  watchEffect(() => {
    const font = "color: #554f46; font: 8pt 'Fira Sans', sans-serif;"
    style.textContent = `@media print { @page { size: A4; margin: 16mm 15mm;
      @bottom-left { content: ${cssString(text())}; ${font} }
      @bottom-right { content: counter(page) ' of ' counter(pages); ${font} } } }`
  })
  onScopeDispose(() => style.remove())
}

/** Text as a string of CSS: what could end it is written by its number. */
function cssString(text: string): string {
  return `"${text.replace(/["\\<\n]/g, (letter) => `\\${letter.charCodeAt(0).toString(16)} `)}"`
}
