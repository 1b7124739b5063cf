/** Hands a text file to the browser's downloads. */
export function saveFile(name: string, text: string, type = 'application/json'): void {
  const url = URL.createObjectURL(new Blob([text], { type }))
  const link = document.createElement('a')
  link.href = url
  link.download = name.replace(/[\\/:*?"<>|]/g, ' ')
  link.click()
  // Some browsers read it only after the click.
  setTimeout(() => URL.revokeObjectURL(url), 60_000)
}
