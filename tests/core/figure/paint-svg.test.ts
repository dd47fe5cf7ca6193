import { XMLParser, XMLValidator } from 'fast-xml-parser'
import { describe, expect, it } from 'vitest'
import { paintSvg } from '../../../core/figure/paint-svg.ts'
import { figureRecipeSchema } from '../../../core/figure/recipe.ts'
import { sceneOf } from '../../../core/figure/scene-of.ts'
import { textsOf } from '../../../core/figure/scene.ts'
import { inventedGalaxies } from './invented.ts'

interface Node {
  '#text'?: string
  [key: string]: unknown
}

/** All elements of a name, wherever they are. */
function elements(node: unknown, name: string): (Node | string)[] {
  if (Array.isArray(node)) return node.flatMap((one) => elements(one, name))
  if (typeof node !== 'object' || node === null) return []
  return Object.entries(node).flatMap(([key, value]) => (key === name ? (Array.isArray(value) ? (value as Node[]) : [value as Node]) : elements(value, name)))
}

const parse = (svg: string): unknown => new XMLParser({ ignoreAttributes: false, processEntities: true, parseTagValue: false, trimValues: false }).parse(svg)

describe.each(['sky', 'plane'] as const)('a %s as SVG', (view) => {
  const recipe = figureRecipeSchema.parse({ view, caption: 'One, two.', widthMm: 88 })
  const scene = sceneOf(inventedGalaxies(200), recipe, { releaseLabel: 'release 2026.2' })
  const svg = paintSvg(scene, { metadata: JSON.stringify(recipe) })

  it('is XML, of the width asked for', () => {
    expect(XMLValidator.validate(svg)).toBe(true)
    expect(svg).toContain('width="88mm"')
    expect(svg).not.toMatch(/NaN|undefined|Infinity/)
  })

  it('has every text of the scene as text', () => {
    const texts = elements(parse(svg), 'text').map((node) => (typeof node === 'string' ? node : (node['#text'] ?? '')))
    for (const mark of textsOf(scene.marks)) expect(texts, mark.text).toContain(mark.text)
  })

  it('holds its own recipe', () => {
    const [metadata] = elements(parse(svg), 'metadata')
    expect(figureRecipeSchema.parse(JSON.parse(typeof metadata === 'string' ? metadata : ''))).toEqual(recipe)
  })
})

it('names and titles with XML’s own letters, controls and halves of letters do no harm', () => {
  const [galaxy] = inventedGalaxies(1)
  if (!galaxy) throw new Error('no galaxy')
  const awkward = '<b>&"\'</b> ]]> \u0000\u0008\ud800 M\u202fγ'
  const recipe = figureRecipeSchema.parse({ view: 'sky', title: awkward, caption: awkward, credit: awkward })
  const svg = paintSvg(sceneOf([{ ...galaxy, name: awkward }], recipe), { metadata: JSON.stringify(recipe) })
  expect(XMLValidator.validate(svg)).toBe(true)
  expect(svg).not.toContain('<b>')
  expect(svg).not.toContain('\u0000')
  expect(svg).toContain('&lt;b&gt;&amp;')
})
