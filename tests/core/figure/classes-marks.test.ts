import { readFileSync } from 'node:fs'
import { Resvg } from '@resvg/resvg-js'
import { describe, expect, it } from 'vitest'
import { GALAXY_CLASSES, type GalaxyClass } from '../../../core/classes.ts'
import { CLASS_MARKS, classColour } from '../../../core/figure/classes-marks.ts'
import { paintSvg } from '../../../core/figure/paint-svg.ts'
import { FIGURE_THEMES } from '../../../core/figure/recipe.ts'
import type { Mark, Scene } from '../../../core/figure/scene.ts'
import { CLASS_HUES, FIGURE_COLOURS } from '../../../core/figure/theme.ts'
import { ciede2000, contrast, DEFICIENCIES, lab, linear, seenWith, type Triple } from './colour-science.ts'

const css = readFileSync(new URL('../../../src/styles/theme.css', import.meta.url), 'utf8')

function token(selector: string, name: string): string {
  const start = css.indexOf(`\n${selector} {`)
  const found = new RegExp(`--${name}:\\s*(#[0-9a-f]{6})`, 'i').exec(css.slice(start, css.indexOf('\n}', start)))
  if (!found?.[1]) throw new Error(`no token ${name} in ${selector}`)
  return found[1]
}

/** A mark in one ink on white, so many pixels wide; how dark each pixel is, 0 to 1. */
function pixels(key: GalaxyClass, px: number): number[] {
  const dot: Mark = { kind: 'dot', shape: CLASS_MARKS[key].shape, x: 1, y: 1, size: 2, colour: '#000000' }
  const scene: Scene = { widthMm: 2, heightMm: 2, title: key, description: '', background: '#ffffff', marks: [dot], hits: [], map: { minX: 0, minY: 0, maxX: 2, maxY: 2 } }
  const drawn = new Resvg(paintSvg(scene), { fitTo: { mode: 'width', value: px } }).render()
  return Array.from({ length: px * px }, (_, i) => 1 - (drawn.pixels[4 * i] ?? 255) / 255)
}

/** The CIEDE2000 of colours that shapes alone tell apart less well must be at least this; about twice what is plainly seen side by side. */
const CLEARLY_DIFFERENT = 10

/** Filled blobs, or open outlines, that at a glance look alike. */
const ALIKE: GalaxyClass[][] = [
  ['spiral', 'elliptical', 'blue-compact', 'dwarf-irregular'],
  ['lenticular', 'elliptical', 'blue-compact', 'irregular'],
  ['dwarf-elliptical', 'dwarf-spheroidal', 'transition'],
  ['ultra-faint', 'unknown'],
  ['spiral', 'dwarf-spheroidal'],
]

/** Share of two marks' ink that lies in different places, at least; the nearest pair is the disc and the square of like area, 0.18. */
const LEAST_APART = 0.18

describe('shapes of classes', () => {
  it('every class has a shape of its own', () => {
    const shapes = GALAXY_CLASSES.map((key) => JSON.stringify(CLASS_MARKS[key].shape))
    expect(new Set(shapes).size).toBe(GALAXY_CLASSES.length)
  })

  it.each([6, 8, 12])('no two look alike in one ink at %i px', (px) => {
    for (const [i, a] of GALAXY_CLASSES.entries()) {
      for (const b of GALAXY_CLASSES.slice(i + 1)) {
        const [one, other] = [pixels(a, px), pixels(b, px)]
        const apart = one.reduce((sum, dark, at) => sum + Math.abs(dark - (other[at] ?? 0)), 0)
        const ink = (one.reduce((sum, dark) => sum + dark, 0) + other.reduce((sum, dark) => sum + dark, 0)) / 2
        expect(apart / ink, `${a} and ${b}`).toBeGreaterThanOrEqual(LEAST_APART)
      }
    }
  })
})

describe.each(FIGURE_THEMES)('colours of classes on %s', (theme) => {
  const colours = FIGURE_COLOURS[theme]

  it('stand out from what they lie on', () => {
    for (const key of GALAXY_CLASSES) {
      for (const ground of [colours.sheet, colours.paper]) expect(contrast(classColour(key, colours, 'class'), ground), key).toBeGreaterThanOrEqual(3)
    }
    for (const text of [colours.ink, colours.muted]) for (const ground of [colours.sheet, colours.paper]) expect(contrast(text, ground)).toBeGreaterThanOrEqual(4.5)
    expect(contrast(colours.accent, colours.sheet)).toBeGreaterThanOrEqual(3)
  })

  it('tell apart shapes that look alike, also for those who see fewer colours', () => {
    const views: [string, (rgb: Triple) => Triple][] = [['all colours', (rgb) => rgb], ...Object.entries(DEFICIENCIES).map(([name, matrix]): [string, (rgb: Triple) => Triple] => [name, (rgb) => seenWith(rgb, matrix)])]
    for (const [name, see] of views) {
      for (const group of ALIKE) {
        for (const [i, a] of group.entries()) {
          for (const b of group.slice(i + 1)) {
            const difference = ciede2000(lab(see(linear(classColour(a, colours, 'class')))), lab(see(linear(classColour(b, colours, 'class')))))
            expect(difference, `${a} and ${b}, ${name}`).toBeGreaterThanOrEqual(CLEARLY_DIFFERENT)
          }
        }
      }
    }
  })
})

it('one ink is one ink', () => {
  for (const key of GALAXY_CLASSES) expect(classColour(key, FIGURE_COLOURS.print, 'one-ink')).toBe(FIGURE_COLOURS.print.ink)
})

it.each([
  ['paper', ':root'],
  ['night', ":root[data-theme='night']"],
] as const)('%s has the colours of the pages', (theme, selector) => {
  const { classes, ...rest } = FIGURE_COLOURS[theme]
  for (const [name, colour] of Object.entries(rest)) expect(colour, name).toBe(token(selector, name))
  for (const hue of CLASS_HUES) expect(classes[hue], hue).toBe(token(selector, `class-${hue}`))
})

it('the colour difference is the published one', () => {
  // Sharma, Wu & Dalal 2005, table 1, pairs 1, 7, 17 and 25.
  const pairs: [Triple, Triple, number][] = [
    [[50, 2.6772, -79.7751], [50, 0, -82.7485], 2.0425],
    [[50, 0, 0], [50, -1, 2], 2.3669],
    [[50, 2.5, 0], [73, 25, -18], 27.1492],
    [[60.2574, -34.0099, 36.2677], [60.4626, -34.1751, 39.4387], 1.2644],
  ]
  for (const [a, b, expected] of pairs) expect(ciede2000(a, b)).toBeCloseTo(expected, 4)
})
