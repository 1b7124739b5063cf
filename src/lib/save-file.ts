/** Hands a file to the browser's downloads; `type` is of text, a blob has its own. */
export function saveFile(name: string, content: string | Blob, type = 'application/json'): void {
  const url = URL.createObjectURL(content instanceof Blob ? content : new Blob([content], { type }))
  const link = document.createElement('a')
  link.href = url
  link.download = name.replace(/[\\/:*?"<>|]/g, ' ')
  link.click()
  // Some browsers read it only after the click.
  setTimeout(() => URL.revokeObjectURL(url), 60_000)
}
