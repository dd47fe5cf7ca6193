/** Saving what is drawn on a page: SVG as it stands with the theme's colours resolved, PNG at three times its size. */

const PROPERTIES = ['fill', 'fill-opacity', 'stroke', 'stroke-width', 'stroke-dasharray', 'stroke-linecap', 'stroke-linejoin', 'opacity', 'font-family', 'font-size', 'font-style', 'font-weight', 'text-anchor', 'dominant-baseline', 'letter-spacing'] as const
const PNG_SCALE = 3

/** Hands a file to the browser's downloads. */
export function saveBlob(blob: Blob, fileName: string): void {
  const address = URL.createObjectURL(blob)
  const anchor = document.createElement('a')
  anchor.href = address
  anchor.download = fileName
  anchor.click()
  // The browser has taken hold of it by then.
  setTimeout(() => URL.revokeObjectURL(address), 10_000)
}

/** A copy that looks the same without the page's style sheets: every drawn element carries its computed look. */
function standalone(svg: SVGSVGElement): { text: string; width: number; height: number } {
  const { width, height } = svg.getBoundingClientRect()
  const copy = svg.cloneNode(true) as SVGSVGElement
  const from = [svg, ...svg.querySelectorAll<SVGElement>('*')]
  const to = [copy, ...copy.querySelectorAll<SVGElement>('*')]
  from.forEach((element, index) => {
    const target = to[index]
    if (!target) return
    const look = getComputedStyle(element)
    target.removeAttribute('class')
    if (element !== svg && !(element instanceof SVGGElement)) for (const name of PROPERTIES) target.style.setProperty(name, look.getPropertyValue(name))
  })
  copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg')
  copy.setAttribute('width', String(width))
  copy.setAttribute('height', String(height))
  const ground = document.createElementNS('http://www.w3.org/2000/svg', 'rect')
  ground.setAttribute('width', '100%')
  ground.setAttribute('height', '100%')
  ground.setAttribute('fill', getComputedStyle(document.documentElement).getPropertyValue('--sheet').trim())
  copy.prepend(ground)
  return { text: new XMLSerializer().serializeToString(copy), width, height }
}

/** @param fileName - without the ending */
export function saveSvg(svg: SVGSVGElement, fileName: string): void {
  saveBlob(new Blob([standalone(svg).text], { type: 'image/svg+xml' }), `${fileName}.svg`)
}

/** @param fileName - without the ending */
export async function savePng(svg: SVGSVGElement, fileName: string): Promise<void> {
  const { text, width, height } = standalone(svg)
  const address = URL.createObjectURL(new Blob([text], { type: 'image/svg+xml' }))
  try {
    const image = new Image()
    image.src = address
    await image.decode()
    const canvas = document.createElement('canvas')
    canvas.width = Math.round(width * PNG_SCALE)
    canvas.height = Math.round(height * PNG_SCALE)
    const brush = canvas.getContext('2d')
    if (!brush) throw new Error('This browser cannot paint pictures')
    brush.drawImage(image, 0, 0, canvas.width, canvas.height)
    const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'))
    if (!blob) throw new Error('The picture is too large for this browser')
    saveBlob(blob, `${fileName}.png`)
  } finally {
    URL.revokeObjectURL(address)
  }
}
