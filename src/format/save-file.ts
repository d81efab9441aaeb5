/** Hands a file to the browser's downloads under this name. */
export function saveFile(file: Blob, name: string): void {
  const address = URL.createObjectURL(file)
  const link = document.createElement('a')
  link.href = address
  link.download = name
  link.click()
  // The browser has begun to read it by then.
  window.setTimeout(() => URL.revokeObjectURL(address), 60_000)
}
