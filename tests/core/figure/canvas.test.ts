import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { chromium, type Browser } from 'playwright-core'
import { build } from 'vite'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { canvasFont } from '../../../core/figure/paint-canvas.ts'
import { figureRecipeSchema, type FigureRecipe } from '../../../core/figure/recipe.ts'
import { FACES } from '../../../core/figure/scene.ts'
import { CHROMIUM_FLAGS, findChromium } from '../../../scripts/chromium.mjs'
import { renderFigure } from '../../../server/figures/render.ts'
import { inventedGalaxies } from './invented.ts'
import { difference } from './picture-difference.ts'

/** Grey levels: the browser sets light letters on dark a little bolder, which comes to 13 in the worst square; names left out come to 20 and more. */
const MEAN = 1.6
const WORST = 16

const require = createRequire(import.meta.url)

/** The fonts of figures, as the pages load them. */
function fontFace(file: string, family: string, weight: string, style = 'normal'): string {
  return `@font-face{font-family:'${family}';font-weight:${weight};font-style:${style};src:url(data:font/woff2;base64,${readFileSync(require.resolve(file)).toString('base64')})}`
}

const SANS = '@fontsource-variable/source-sans-3/files/source-sans-3-latin-wght'
const SERIF = 'source-serif/WOFF2/TTF/SourceSerif4'
const FONTS = [
  fontFace(`${SANS}-normal.woff2`, 'Source Sans 3 Variable', '200 900'),
  fontFace(`${SANS}-italic.woff2`, 'Source Sans 3 Variable', '200 900', 'italic'),
  fontFace(`${SERIF}-Regular.ttf.woff2`, 'Source Serif 4', '400'),
  fontFace(`${SERIF}-Semibold.ttf.woff2`, 'Source Serif 4', '600'),
].join('')

/** What the page's script (canvas-page.ts) offers. */
interface CanvasPage {
  drawFigure: (recipe: FigureRecipe, galaxies: unknown, pxPerMm: number) => string
}

let browser: Browser
let script = ''

beforeAll(async () => {
  const built = await build({
    configFile: false,
    logLevel: 'silent',
    build: { write: false, minify: false, lib: { entry: new URL('./canvas-page.ts', import.meta.url).pathname, formats: ['iife'], name: 'figurePage' } },
  })
  const [output] = Array.isArray(built) ? built : [built]
  const chunk = output && 'output' in output ? output.output[0] : undefined
  if (!chunk) throw new Error('the page script was not built')
  script = chunk.code
  const executablePath = findChromium()
  if (!executablePath) throw new Error('No Chromium was found; "npm test" installs it.')
  browser = await chromium.launch({ executablePath, args: CHROMIUM_FLAGS })
}, 60_000)

afterAll(() => browser.close())

async function openPage(): ReturnType<Browser['newPage']> {
  const page = await browser.newPage({ viewport: { width: 1300, height: 900 } })
  await page.setContent(`<style>${FONTS}</style><canvas id="figure"></canvas>`)
  await page.evaluate((fonts) => Promise.all(fonts.map((font) => document.fonts.load(font))), FACES.map((face) => canvasFont(face, 12)))
  await page.addScriptTag({ content: script })
  return page
}

describe('the canvas', () => {
  it.each([
    ['sky', 'paper'],
    ['plane', 'night'],
  ] as const)('draws the %s (%s) as the PNG has it', async (view, theme) => {
    const dpi = 144
    const recipe = figureRecipeSchema.parse({ view, theme, dpi, widthMm: 180 })
    const galaxies = inventedGalaxies(300)
    const page = await openPage()
    const url = await page.evaluate(
      ([given, rows, pxPerMm]) => (globalThis as unknown as { figurePage: CanvasPage }).figurePage.drawFigure(given, rows, pxPerMm),
      [recipe, galaxies, dpi / 25.4] as const,
    )
    await page.close()
    const onScreen = Buffer.from(url.slice(url.indexOf(',') + 1), 'base64')
    const { bytes } = await renderFigure(recipe, galaxies, { format: 'png', releaseLabel: 'release 2026.2', date: new Date(0) })
    const apart = await difference(bytes, onScreen)
    expect(apart.mean).toBeLessThan(MEAN)
    expect(apart.worst).toBeLessThan(WORST)
    const nameless = await renderFigure({ ...recipe, labels: { count: 0, hosts: false } }, galaxies, { format: 'png', releaseLabel: 'release 2026.2', date: new Date(0) })
    const without = await difference(bytes, nameless.bytes)
    expect(without.worst).toBeGreaterThan(WORST)
  })
})
