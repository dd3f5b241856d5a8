const HELD_MILLISECONDS = 60_000

/** Hands a file to the person as a download. */
export function saveFile(name: string, content: Blob): void {
  const link = document.createElement('a')
  link.href = URL.createObjectURL(content)
  link.download = name
  link.click()
  // A browser may begin to read some time after the click; nothing tells when it has.
  setTimeout(() => URL.revokeObjectURL(link.href), HELD_MILLISECONDS)
}
