/** Saving what is drawn on a page: SVG as it stands with the theme's colours resolved, PNG at three times its size. */
import sansAddress from '@fontsource-variable/source-sans-3/files/source-sans-3-latin-wght-normal.woff2?url'

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

const SVG = 'http://www.w3.org/2000/svg'
const MARGIN = 20
const TITLE_HEIGHT = 36

function element(name: string, attributes: Record<string, string | number>): SVGElement {
  const made = document.createElementNS(SVG, name)
  for (const [key, value] of Object.entries(attributes)) made.setAttribute(key, String(value))
  return made
}

/** The font of the labels as a data address, so that the picture looks the same where the font is not installed. */
async function fontRule(): Promise<string> {
  const response = await fetch(sansAddress)
  const bytes = new Uint8Array(await response.arrayBuffer())
  let text = ''
  for (const byte of bytes) text += String.fromCharCode(byte)
  return `@font-face{font-family:"Source Sans 3 Variable";font-weight:200 900;src:url(data:font/woff2;base64,${btoa(text)}) format("woff2")}`
}

/** A copy that looks the same without the page's style sheets: every drawn element carries its computed look; with the title above. */
async function standalone(svg: SVGSVGElement, title: string): Promise<{ text: string; width: number; height: number }> {
  const box = svg.getBoundingClientRect()
  const width = box.width + 2 * MARGIN
  const height = box.height + 2 * MARGIN + TITLE_HEIGHT
  const page = getComputedStyle(document.documentElement)
  const copy = svg.cloneNode(true) as SVGSVGElement
  const drawn = [...svg.querySelectorAll<SVGElement>('*')]
  const copied = [...copy.querySelectorAll<SVGElement>('*')]
  drawn.forEach((original, index) => {
    const target = copied[index]
    if (!target) return
    target.removeAttribute('class')
    if (original instanceof SVGGElement) return
    const look = getComputedStyle(original)
    for (const name of PROPERTIES) target.style.setProperty(name, look.getPropertyValue(name))
  })
  const whole = element('svg', { xmlns: SVG, width, height, viewBox: `0 0 ${width} ${height}` })
  const style = element('style', {})
  style.textContent = await fontRule()
  const heading = element('text', { x: MARGIN, y: MARGIN + 18, 'font-family': '"Source Sans 3 Variable", sans-serif', 'font-size': 20, 'font-weight': 600, fill: page.getPropertyValue('--ink').trim() })
  heading.textContent = title
  const content = element('g', { transform: `translate(${MARGIN} ${MARGIN + TITLE_HEIGHT})` })
  content.append(...copy.childNodes)
  whole.append(style, element('rect', { width: '100%', height: '100%', fill: page.getPropertyValue('--sheet').trim() }), heading, content)
  return { text: new XMLSerializer().serializeToString(whole), width, height }
}

/** @param fileName - without the ending; @param title - written above the picture */
export async function saveSvg(svg: SVGSVGElement, fileName: string, title: string): Promise<void> {
  const { text } = await standalone(svg, title)
  saveBlob(new Blob([text], { type: 'image/svg+xml' }), `${fileName}.svg`)
}

/** @param fileName - without the ending; @param title - written above the picture */
export async function savePng(svg: SVGSVGElement, fileName: string, title: string): Promise<void> {
  const { text, width, height } = await standalone(svg, title)
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
