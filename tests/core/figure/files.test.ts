import { execFileSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { Resvg } from '@resvg/resvg-js'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { figureRecipeSchema, type FigureRecipe } from '../../../core/figure/recipe.ts'
import { sceneOf } from '../../../core/figure/scene-of.ts'
import { FACES, textsOf, type Box } from '../../../core/figure/scene.ts'
import { FONT_ADVANCES } from '../../../core/figure/font-metrics.ts'
import { textBox } from '../../../core/figure/text-metrics.ts'
import type { FigureFormat } from '../../../core/schema/figures.ts'
import { advanceTable } from '../../../server/figures/font-advances.ts'
import { fontPath } from '../../../server/figures/fonts.ts'
import { FigureTooLarge, renderFigure } from '../../../server/figures/render.ts'
import { inventedGalaxies } from './invented.ts'
import { difference, grey } from './picture-difference.ts'

const galaxies = inventedGalaxies(300)
const date = new Date('2026-02-01T12:00:00Z')
const MM_PER_INCH = 25.4
const DPI = 120

const recipes: Record<string, FigureRecipe> = {
  'sky, paper': figureRecipeSchema.parse({ view: 'sky', dpi: DPI, caption: 'Galaxies nearby, “so to speak”: α and β; 1.5 ± 0.2 Mpc.' }),
  'plane, night, one column': figureRecipeSchema.parse({ view: 'plane', dpi: DPI, widthMm: 88, theme: 'night', units: 'Mly' }),
  'plane, print, one ink': figureRecipeSchema.parse({ view: 'plane', dpi: DPI, theme: 'print', colour: 'one-ink', plane: { axes: 'sgy-sgz' } }),
}

let folder = ''
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'vicinage-figures-'))
})
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const render = (recipe: FigureRecipe, format: FigureFormat): ReturnType<typeof renderFigure> => renderFigure(recipe, galaxies, { format, releaseLabel: 'release 2026.2', date })

/** Bars for the two, grey levels: pictures that agree stay at 0.6 and 7, a picture without names comes to 20 in its worst square. */
const MEAN = 0.7
const WORST = 10

/** By poppler, finer than wanted and then made smaller: it sets letters on whole pixels. */
function rasterised(pdf: Buffer, name: string, { width, height }: { width: number; height: number }): Promise<Buffer> {
  const path = join(folder, `${name}.pdf`)
  writeFileSync(path, pdf)
  execFileSync('pdftoppm', ['-scale-to-x', String(3 * width), '-scale-to-y', String(3 * height), '-png', '-singlefile', path, join(folder, name)])
  return sharp(readFileSync(join(folder, `${name}.png`))).resize({ width, height, fit: 'fill' }).png().toBuffer()
}

describe.each(Object.entries(recipes))('%s', (label, recipe) => {
  const name = label.replace(/\W+/g, '-')
  const scene = sceneOf(galaxies, recipe, { releaseLabel: 'release 2026.2' })

  it('a PNG has the width and the resolution asked for, and ink where texts are', async () => {
    const { bytes, mediaType, fileName } = await render(recipe, 'png')
    expect(mediaType).toBe('image/png')
    expect(fileName).toMatch(/^[a-z0-9-]+\.png$/)
    const metadata = await sharp(bytes).metadata()
    expect(metadata.density).toBe(DPI)
    expect(metadata.width).toBe(Math.round((recipe.widthMm / MM_PER_INCH) * DPI))
    expect(metadata.hasAlpha).toBe(false)
    const image = await grey(bytes)
    const scale = DPI / MM_PER_INCH
    const texts = [...textsOf(scene.marks)].filter((mark) => mark.turn === undefined)
    expect(texts.length).toBeGreaterThan(20)
    for (const mark of texts) {
      // Capitals' own band: an empty one means that the rasteriser found no font.
      const box = textBox(mark)
      expect(contrastIn(image, { ...box, minY: mark.y - 0.6 * mark.size, maxY: mark.y }, scale), mark.text).toBeGreaterThan(25)
    }
  })

  it('PDF, PNG and rasterised SVG are one picture', async () => {
    const [svg, pdf, png] = await Promise.all([render(recipe, 'svg'), render(recipe, 'pdf'), render(recipe, 'png')])
    const drawn = new Resvg(svg.bytes.toString('utf8'), { fitTo: { mode: 'width', value: Math.round((recipe.widthMm / MM_PER_INCH) * DPI) }, font: { loadSystemFonts: false, fontFiles: FACES.map(fontPath) } }).render().asPng()
    expect((await difference(png.bytes, drawn)).mean).toBeLessThan(0.05)
    const fromPdf = await rasterised(pdf.bytes, name, await sharp(png.bytes).metadata())
    const apart = await difference(png.bytes, fromPdf)
    expect(apart.mean).toBeLessThan(MEAN)
    expect(apart.worst).toBeLessThan(WORST)
    // The bars mean something: a picture one pixel aside is beyond the first, one without names beyond the second.
    const aside = await sharp(png.bytes).affine([1, 0, 0, 1], { odx: 1, ody: 1 }).png().toBuffer()
    expect((await difference(png.bytes, aside)).mean).toBeGreaterThan(MEAN)
    const nameless = await render({ ...recipe, labels: { count: 0, hosts: false } }, 'png')
    const without = await difference(png.bytes, nameless.bytes)
    expect(without.worst).toBeGreaterThan(WORST)
  })

  it('a PDF embeds its fonts as subsets, has real text, the right page and the same bytes again', async () => {
    const { bytes } = await render(recipe, 'pdf')
    const path = join(folder, `${name}-fonts.pdf`)
    writeFileSync(path, bytes)
    const fonts = execFileSync('pdffonts', [path], { encoding: 'utf8' }).trim().split('\n').slice(2)
    expect(fonts.length).toBeGreaterThanOrEqual(3)
    for (const line of fonts) {
      expect(line).toMatch(/^[A-Z]{6}\+Source/)
      expect(line).not.toMatch(/Type 3/)
      expect(line).toMatch(/\s+yes\s+yes\s+yes\s+\d+\s+\d+$/)
    }
    const text = execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' })
    expect(text).toContain(scene.title)
    expect(text).toContain('release 2026.2')
    expect(text).toContain('dwarf spheroidal')
    const page = /Page size:\s+([\d.]+) x ([\d.]+) pts/.exec(execFileSync('pdfinfo', [path], { encoding: 'utf8' }))
    expect(Number(page?.[1])).toBeCloseTo((recipe.widthMm / MM_PER_INCH) * 72, 1)
    expect(Number(page?.[2])).toBeCloseTo((scene.heightMm / MM_PER_INCH) * 72, 1)
    expect((await render(recipe, 'pdf')).bytes.equals(bytes)).toBe(true)
  })

  it('an SVG carries the letters it needs and no more', async () => {
    const { bytes } = await render(recipe, 'svg')
    const svg = bytes.toString('utf8')
    const inlined = [...svg.matchAll(/@font-face\{font-family:'([^']+)';[^}]*base64,([A-Za-z0-9+/=]+)\)/g)]
    expect(inlined.length).toBe(new Set([...textsOf(scene.marks)].map((mark) => mark.face)).size)
    for (const [, family, base64] of inlined) {
      const woff2 = Buffer.from(base64 ?? '', 'base64')
      expect(family).toMatch(/^Source S/)
      expect(woff2.subarray(0, 4).toString('latin1')).toBe('wOF2')
      expect(woff2.length).toBeLessThan(20_000)
    }
  })
})

/** Greatest difference of grey levels within a rectangle of the picture. */
function contrastIn({ data, width, height }: { data: Buffer; width: number; height: number }, box: Box, scale: number): number {
  let least = 255
  let most = 0
  for (let y = Math.max(0, Math.floor(box.minY * scale)); y < Math.min(height, Math.ceil(box.maxY * scale)); y += 1) {
    for (let x = Math.max(0, Math.floor(box.minX * scale)); x < Math.min(width, Math.ceil(box.maxX * scale)); x += 1) {
      const level = data[y * width + x] ?? 0
      least = Math.min(least, level)
      most = Math.max(most, level)
    }
  }
  return most - least
}

it('a PNG too large to draw is refused with what to do', async () => {
  const recipe = figureRecipeSchema.parse({ view: 'plane', widthMm: 420, dpi: 1200 })
  await expect(render(recipe, 'png')).rejects.toThrow(FigureTooLarge)
  await expect(render(recipe, 'png')).rejects.toThrow(/choose \d+ dpi or less, or PDF/)
})

it('a figure of no galaxies is still a figure', async () => {
  for (const view of ['sky', 'plane'] as const) {
    for (const format of ['svg', 'pdf', 'png'] as const) {
      const { bytes } = await renderFigure(figureRecipeSchema.parse({ view, dpi: 72, plane: { radius: 0.3, centre: { sgx: 300, sgy: -200, sgz: 5 } } }), [], { format, releaseLabel: '', date })
      expect(bytes.length).toBeGreaterThan(1000)
    }
  }
})

it('the table of widths is that of the shipped fonts', async () => {
  const table = await advanceTable()
  for (const face of FACES) expect(FONT_ADVANCES[face].map(([first, widths]) => [first, widths.split(' ').map(Number)])).toEqual(table[face])
})
