import { describe, expect, it } from 'vitest'
import { FRAMES } from '../../../core/astro/frames.ts'
import { FIGURE_THEMES, figureRecipeSchema, LENGTH_UNITS, PLANE_AXES, PROJECTIONS, VIEWS, type FigureRecipe } from '../../../core/figure/recipe.ts'
import { sceneOf } from '../../../core/figure/scene-of.ts'
import { hitAt, MM_PER_PT, textsOf, type Box, type GroupMark, type Scene, type TextMark } from '../../../core/figure/scene.ts'
import { textBox, textWidth, wrapText } from '../../../core/figure/text-metrics.ts'
import { random } from '../../../core/random.ts'
import { inventedGalaxies } from './invented.ts'

const galaxies = inventedGalaxies(400)

/** Recipes of every kind, the same at every run. */
function randomRecipes(count: number): FigureRecipe[] {
  const rng = random(42)
  return Array.from({ length: count }, () => {
    const zoomed = rng.uniform() < 0.5
    const host = galaxies[rng.integer(12)]
    return figureRecipeSchema.parse({
      view: rng.pick(VIEWS),
      sky: { projection: rng.pick(PROJECTIONS), frame: rng.pick(FRAMES), centreLon: 360 * rng.uniform(), zoneOfAvoidance: rng.uniform() < 0.7, supergalacticPlane: rng.uniform() < 0.7 },
      plane: {
        axes: rng.pick(PLANE_AXES),
        radius: zoomed ? 0.3 + 3 * rng.uniform() : rng.pick([0.01, 1, 10, 11, 500]),
        ...(zoomed && host?.sgx != null && host.sgy != null && host.sgz != null ? { centre: { sgx: host.sgx, sgy: host.sgy, sgz: host.sgz } } : {}),
      },
      colour: rng.pick(['class', 'one-ink']),
      size: rng.pick(['luminosity', 'fixed']),
      labels: { count: rng.integer(120), hosts: rng.uniform() < 0.7 },
      units: rng.pick(LENGTH_UNITS),
      title: rng.pick(['', 'Galaxienhaufenverteilungskartenausschnitt', 'Companions of our neighbours, and what lies between them, in a title that is too long for one line of a narrow figure']),
      caption: rng.pick(['', 'Invented galaxies by class and luminosity. '.repeat(4)]),
      credit: rng.pick(['', 'A group of astronomers']),
      theme: rng.pick(FIGURE_THEMES),
      widthMm: rng.pick([40, 60, 88, 120, 180, 297, 420]),
    })
  })
}

const named = (scene: Scene, name: string): GroupMark => {
  const group = scene.marks.find((mark): mark is GroupMark => mark.kind === 'group' && mark.name === name)
  if (!group) throw new Error(`no group ${name}`)
  return group
}

const textsIn = (scene: Scene, name: string): TextMark[] => [...textsOf(named(scene, name).marks)]

/** Turned texts stand on their side. */
function boxOf(mark: TextMark): Box {
  if (mark.turn !== -90) return textBox(mark)
  const flat = textBox({ ...mark, x: 0, y: 0 })
  return { minX: mark.x + flat.minY, maxX: mark.x + flat.maxY, minY: mark.y - flat.maxX, maxY: mark.y - flat.minX }
}

function overlap(a: Box, b: Box): boolean {
  const slack = 1e-6
  return a.minX < b.maxX - slack && b.minX < a.maxX - slack && a.minY < b.maxY - slack && b.minY < a.maxY - slack
}

describe('a hundred random figures', () => {
  const figures = randomRecipes(100).map((recipe) => ({ recipe, scene: sceneOf(galaxies, recipe, { releaseLabel: 'release 2026.2' }) }))

  it('no names overlap one another, nor the labels of the net and of rings', () => {
    let pairs = 0
    for (const { recipe, scene } of figures) {
      const names = textsIn(scene, 'names')
      const fixed = recipe.view === 'sky' ? textsIn(scene, 'graticule labels') : [...textsIn(scene, 'distances'), ...textsIn(scene, 'scale bar'), ...textsIn(scene, 'axes')]
      const all = [...names, ...fixed]
      for (const [i, a] of all.entries()) {
        for (const b of all.slice(i + 1)) {
          pairs += 1
          if (overlap(boxOf(a), boxOf(b))) throw new Error(`“${a.text}” over “${b.text}” in ${JSON.stringify(recipe)}`)
        }
      }
    }
    expect(pairs).toBeGreaterThan(10_000)
  })

  it('names lie within the map', () => {
    for (const { scene } of figures) {
      for (const label of textsIn(scene, 'names')) {
        const box = textBox(label)
        expect(box.minX >= scene.map.minX && box.maxX <= scene.map.maxX && box.minY >= scene.map.minY && box.maxY <= scene.map.maxY, label.text).toBe(true)
      }
    }
  })

  it('nothing is cut off, nothing set below 6 pt but the small V of the magnitudes', () => {
    for (const { recipe, scene } of figures) {
      for (const mark of textsOf(scene.marks)) {
        const box = boxOf(mark)
        expect(box.minX >= -1e-6 && box.maxX <= scene.widthMm + 1e-6 && box.minY >= -1e-6 && box.maxY <= scene.heightMm + 1e-6, `“${mark.text}” in ${JSON.stringify(recipe)}`).toBe(true)
        if (mark.text !== 'V') expect(mark.size / MM_PER_PT, mark.text).toBeGreaterThanOrEqual(6 - 1e-9)
      }
    }
  })

  it('blocks stand one below the other', () => {
    for (const { recipe, scene } of figures) {
      const blocks = ['title', 'legend', 'caption', 'credit']
        .filter((name) => scene.marks.some((mark) => mark.kind === 'group' && mark.name === name))
        .map((name) => textsIn(scene, name).map(textBox))
        .filter((boxes) => boxes.length > 0)
      const bands = blocks.map((boxes) => [Math.min(...boxes.map((box) => box.minY)), Math.max(...boxes.map((box) => box.maxY))] as const)
      bands.splice(recipe.heading ? 1 : 0, 0, [scene.map.minY, scene.map.maxY])
      for (const [i, band] of bands.entries()) if (i > 0) expect(band[0], JSON.stringify(recipe)).toBeGreaterThan((bands[i - 1]?.[1] ?? 0) - 0.1)
    }
  })

  it('the same recipe gives the same scene', () => {
    for (const { recipe, scene } of figures.slice(0, 10)) expect(sceneOf(galaxies, recipe, { releaseLabel: 'release 2026.2' })).toEqual(scene)
  })

  it('hosts are named before all others', () => {
    const scene = sceneOf(galaxies, figureRecipeSchema.parse({ view: 'sky', labels: { count: 6, hosts: true } }))
    const hosts = new Set(galaxies.filter((galaxy) => galaxy.relation === 'host').map((galaxy) => galaxy.name))
    const names = textsIn(scene, 'names').map((label) => label.text)
    expect(names).toHaveLength(6)
    for (const name of names) expect(hosts).toContain(name)
  })
})

it('a map alone keeps its letters within its edges too', () => {
  for (const recipe of randomRecipes(60)) {
    const scene = sceneOf(galaxies, recipe, { bare: true })
    for (const mark of textsOf(scene.marks)) {
      const box = boxOf(mark)
      expect(box.minX >= 0 && box.maxX <= scene.widthMm && box.minY >= 0 && box.maxY <= scene.heightMm, `“${mark.text}” in ${JSON.stringify(recipe)}`).toBe(true)
    }
  }
})

describe('what the pointer finds', () => {
  it('is the galaxy drawn there', () => {
    const scene = sceneOf(galaxies, figureRecipeSchema.parse({ view: 'plane' }), { bare: true })
    const lonely = scene.hits.find((hit) => scene.hits.every((other) => other === hit || Math.hypot(other.x - hit.x, other.y - hit.y) > 4))
    if (!lonely) throw new Error('all galaxies are crowded')
    expect(hitAt(scene.hits, lonely.x + lonely.radius, lonely.y)?.id).toBe(lonely.id)
    expect(hitAt(scene.hits, lonely.x + 3, lonely.y)).toBeNull()
  })
})

describe('measured texts', () => {
  it('lines are no wider than their measure, and no word is lost', () => {
    const text = 'The neighbourhood of our Galaxy out to eleven megaparsecs.\nA second paragraph.'
    const lines = wrapText(text, 'serif', 3, 30)
    for (const line of lines) expect(textWidth(line, 'serif', 3)).toBeLessThanOrEqual(30)
    expect(lines.join(' ')).toBe(text.replace('\n', ' '))
  })
})
