import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'

/** The tokens of both themes as they are written, so that a colour cannot be changed past its bar. */
const css = readFileSync(new URL('../../src/styles/theme.css', import.meta.url), 'utf8')

function tokensOf(selector: string): Record<string, string> {
  const start = css.indexOf(`\n${selector} {`)
  const block = css.slice(start, css.indexOf('\n}', start))
  return Object.fromEntries([...block.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})\b/gi)].map((match) => [match[1] ?? '', match[2] ?? '']))
}

type Rgb = [number, number, number]

function linear(colour: string): Rgb {
  const channel = (from: number): number => {
    const c = Number.parseInt(colour.slice(from, from + 2), 16) / 255
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4
  }
  return [channel(1), channel(3), channel(5)]
}

const luminance = ([r, g, b]: Rgb): number => 0.2126 * r + 0.7152 * g + 0.0722 * b

/** WCAG 2.2 contrast ratio, 1 to 21. */
function contrast(a: string, b: string): number {
  const [light, dark] = [luminance(linear(a)), luminance(linear(b))].sort((x, y) => y - x)
  return ((light ?? 0) + 0.05) / ((dark ?? 0) + 0.05)
}

/** Machado, Oliveira & Fernandes 2009, severity 1.0, on linear RGB. */
const DEFICIENCIES: Record<string, [Rgb, Rgb, Rgb]> = {
  protanopia: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deuteranopia: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritanopia: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
}

function seenWith(colour: string, matrix: [Rgb, Rgb, Rgb]): Rgb {
  const rgb = linear(colour)
  const clip = (row: Rgb): number => Math.min(1, Math.max(0, row[0] * rgb[0] + row[1] * rgb[1] + row[2] * rgb[2]))
  return [clip(matrix[0]), clip(matrix[1]), clip(matrix[2])]
}

const TO_XYZ: [Rgb, Rgb, Rgb] = [
  [0.4124564, 0.3575761, 0.1804375],
  [0.2126729, 0.7151522, 0.072175],
  [0.0193339, 0.119192, 0.9503041],
]
const WHITE: Rgb = [0.95047, 1, 1.08883]

/** CIE 1976 L*a*b* under D65. */
function lab(rgb: Rgb): Rgb {
  const root = (i: 0 | 1 | 2): number => {
    const t = (TO_XYZ[i][0] * rgb[0] + TO_XYZ[i][1] * rgb[1] + TO_XYZ[i][2] * rgb[2]) / WHITE[i]
    return t > 0.008856 ? Math.cbrt(t) : 7.787 * t + 16 / 116
  }
  const [x, y, z] = [root(0), root(1), root(2)]
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)]
}

const difference = (a: Rgb, b: Rgb): number => Math.hypot(...lab(a).map((value, i) => value - (lab(b)[i] ?? 0)))

const THEMES = { paper: tokensOf(':root'), night: tokensOf(":root[data-theme='night']") }
const TEXTS = ['ink', 'muted', 'accent', 'accent-strong', 'good', 'caution', 'stop']
const MARKS = ['edge', 'focus', 'class-spiral', 'class-early', 'class-spheroidal', 'class-irregular', 'class-compact', 'class-unknown']
const RAMP = ['ramp-1', 'ramp-2', 'ramp-3', 'ramp-4', 'ramp-5']

describe.each(Object.entries(THEMES))('%s', (_name, tokens) => {
  const token = (name: string): string => {
    const value = tokens[name]
    if (!value) throw new Error(`no token ${name}`)
    return value
  }

  it.each(TEXTS)('%s can be read on every surface', (text) => {
    for (const surface of ['paper', 'sheet', 'well']) expect(contrast(token(text), token(surface)), surface).toBeGreaterThanOrEqual(4.5)
  })

  it.each([
    ['on-accent', 'accent'],
    ['on-accent', 'accent-strong'],
    ['on-stop', 'stop'],
    ['ink', 'accent-soft'],
    ['accent', 'accent-soft'],
    ['ink', 'stop-soft'],
    ['ink', 'good-soft'],
    ['ink', 'caution-soft'],
    ['good', 'good-soft'],
    ['caution', 'caution-soft'],
    ['stop', 'stop-soft'],
    ['muted', 'accent-soft'],
  ])('%s can be read on %s', (text, surface) => {
    expect(contrast(token(text), token(surface))).toBeGreaterThanOrEqual(4.5)
  })

  it.each(MARKS)('%s can be told from every surface', (mark) => {
    for (const surface of ['paper', 'sheet']) expect(contrast(token(mark), token(surface)), surface).toBeGreaterThanOrEqual(3)
  })

  it('no two class colours are alike, also for those who see fewer colours', () => {
    const classes = MARKS.filter((mark) => mark.startsWith('class-'))
    const views: [string, (colour: string) => Rgb][] = [['all colours', linear], ...Object.entries(DEFICIENCIES).map(([name, matrix]): [string, (colour: string) => Rgb] => [name, (colour) => seenWith(colour, matrix)])]
    for (const [name, see] of views) {
      for (const [i, a] of classes.entries()) {
        for (const b of classes.slice(i + 1)) expect(difference(see(token(a)), see(token(b))), `${a} and ${b}, ${name}`).toBeGreaterThanOrEqual(25)
      }
    }
  })

  it('the ramp runs one way, also for those who see fewer colours', () => {
    for (const [name, matrix] of Object.entries(DEFICIENCIES)) {
      const steps = RAMP.map((step) => luminance(seenWith(token(step), matrix)))
      const falling = (steps[0] ?? 0) > (steps[4] ?? 0)
      for (let i = 1; i < steps.length; i += 1) expect(((steps[i] ?? 0) < (steps[i - 1] ?? 0)) === falling, `${name}, step ${i}`).toBe(true)
    }
  })
})
