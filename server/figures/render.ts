/** A recipe and its galaxies as a file. */
import { Resvg } from '@resvg/resvg-js'
import sharp from 'sharp'
import type { FigureGalaxy } from '../../core/figure/galaxy.ts'
import { paintSvg } from '../../core/figure/paint-svg.ts'
import type { FigureRecipe } from '../../core/figure/recipe.ts'
import { sceneOf } from '../../core/figure/scene-of.ts'
import { FACES, type Scene } from '../../core/figure/scene.ts'
import { slugOf } from '../../core/names.ts'
import type { FigureFormat } from '../../core/schema/figures.ts'
import { fontPath } from './fonts.ts'
import { inlineFonts } from './inline-fonts.ts'
import { paintPdf } from './paint-pdf.ts'

const MM_PER_INCH = 25.4

/** A3 across at 600 dpi has about as many pixels; beyond it a drawing takes gigabytes. */
const MOST_PIXELS = 100e6

export const FIGURE_MEDIA_TYPES: Readonly<Record<FigureFormat, string>> = { svg: 'image/svg+xml', pdf: 'application/pdf', png: 'image/png' }

export interface RenderOptions {
  format: FigureFormat
  /** Label of the release shown, or the revision in words; stands in the credit line. */
  releaseLabel: string
  /** When the data shown were approved: the date that a PDF states. */
  date: Date
}

export interface RenderedFigure {
  bytes: Buffer
  mediaType: string
  fileName: string
}

/** The picture has more pixels than the server draws; its message says what to do. */
export class FigureTooLarge extends Error {
  override readonly name = 'FigureTooLarge'
}

/** @throws FigureTooLarge for a PNG of more than 100 million pixels */
export async function renderFigure(recipe: FigureRecipe, galaxies: readonly FigureGalaxy[], { format, releaseLabel, date }: RenderOptions): Promise<RenderedFigure> {
  const scene = sceneOf(galaxies, recipe, { releaseLabel })
  return { bytes: await bytesOf(scene, recipe, format, date), mediaType: FIGURE_MEDIA_TYPES[format], fileName: `${slugOf(scene.title) || 'figure'}.${format}` }
}

async function bytesOf(scene: Scene, recipe: FigureRecipe, format: FigureFormat, date: Date): Promise<Buffer> {
  switch (format) {
    case 'svg':
      return Buffer.from(paintSvg(scene, { fontCss: await inlineFonts(scene), metadata: JSON.stringify(recipe) }))
    case 'pdf':
      return paintPdf(scene, { author: recipe.credit || 'Vicinage', recipe: JSON.stringify(recipe), date })
    case 'png':
      return paintPng(scene, recipe.dpi)
  }
}

/** The SVG as pixels, with the resolution that gives its size on paper. */
export async function paintPng(scene: Scene, dpi: number): Promise<Buffer> {
  const width = Math.round((scene.widthMm / MM_PER_INCH) * dpi)
  const height = Math.round((scene.heightMm / MM_PER_INCH) * dpi)
  if (width * height > MOST_PIXELS) {
    const fitting = Math.floor(dpi * Math.sqrt(MOST_PIXELS / (width * height)))
    throw new FigureTooLarge(`At ${dpi} dpi the picture would have ${width} × ${height} pixels, more than the server draws. Nothing was made; choose ${fitting} dpi or less, or PDF, which has no limit.`)
  }
  const drawn = new Resvg(paintSvg(scene), {
    fitTo: { mode: 'width', value: width },
    // Files only, and no fonts of the machine: the rasteriser leaves text out without a word when it finds no font, which a test looks for.
    font: { loadSystemFonts: false, fontFiles: FACES.map(fontPath), defaultFontFamily: 'Source Sans 3' },
  }).render()
  return sharp(drawn.pixels, { raw: { width: drawn.width, height: drawn.height, channels: 4 }, limitInputPixels: 2 * MOST_PIXELS })
    .flatten({ background: scene.background })
    .withMetadata({ density: dpi })
    .png({ compressionLevel: 8 })
    .toBuffer()
}
