/** Lets the browser fetch a file of the API by itself, so that it may be of any size. */
export function download(address: string): void {
  const anchor = document.createElement('a')
  anchor.href = address
  anchor.download = ''
  anchor.click()
}
