import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, it } from 'vitest'
import type { HostAnswer, HostsAnswer } from '../../core/schema/catalogue.ts'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { inspectPages, openPage } from './harness/pages.ts'

let app: RunningApp
let chromium: TestBrowser
let hosts: HostsAnswer['hosts']
let rich: HostAnswer
let poor: HostAnswer

async function read<Answer>(path: string): Promise<Answer> {
  return (await (await fetch(`${app.url}${path}`)).json()) as Answer
}

beforeAll(async () => {
  app = await startApp({ catalogue: 'demonstration' })
  chromium = await openBrowser()
  ;({ hosts } = await read<HostsAnswer>('/api/hosts'))
  const shaped = hosts.filter((h) => h.minorToMajor !== null && h.dispersionErr !== null)
  rich = await read(`/api/hosts/${shaped[0]?.slug}`)
  poor = await read(`/api/hosts/${hosts.find((h) => h.members < 5)?.slug}`)
})
afterAll(async () => {
  await chromium?.close()
  await app?.stop()
})

const open = (path: string): Promise<Page> => openPage(app, chromium, path, { viewport: { width: 1440, height: 1000 } })
const path = (): string => `/hosts/${rich.host.slug}`
const marks = (page: Page, words: 'on the plan' | 'by velocity and separation' | 'by luminosity') => page.getByRole('group', { name: `Satellites of ${rich.host.name} ${words}` }).getByRole('link')

it('lists the systems with dispersion, flattening and brightest satellite, and leads to each', async () => {
  const page = await open('/hosts')
  const row = page.getByRole('table', { name: 'Hosts' }).getByRole('row').filter({ has: page.getByRole('rowheader', { name: rich.host.name, exact: true }) })
  const words = (await row.textContent()) ?? ''
  expect(words).toContain(`${rich.host.dispersion?.toFixed(0)}`)
  expect(words).toContain(`±\u00a0${rich.host.dispersionErr?.toFixed(0)}`)
  expect(words).toContain(rich.host.minorToMajor?.toFixed(2))
  expect(words).toContain(rich.host.brightest?.name)
  await row.getByRole('link', { name: rich.host.name, exact: true }).click()
  await page.waitForURL(`${app.url}${path()}`)
})

it('draws every satellite that has a place, a velocity, a magnitude', async () => {
  const page = await open(path())
  const { members, system } = rich
  expect(await marks(page, 'on the plan').count()).toBe(members.filter((m) => m.offset).length)
  expect(await marks(page, 'by velocity and separation').count()).toBe(members.filter((m) => m.dv !== null && m.separationMedian !== null).length)
  expect(await marks(page, 'by luminosity').count()).toBe(system.luminosity.steps.length)
})

it('gives each picture as a table of its numbers', async () => {
  const page = await open(path())
  const asTable = async (title: string, label: string, rows: number) => {
    await page.getByRole('figure').filter({ has: page.getByRole('heading', { name: title }) }).getByRole('button', { name: 'table' }).click()
    await expect.poll(() => page.getByRole('table', { name: label }).locator('tbody tr').count()).toBe(rows)
  }
  const { name } = rich.host
  await asTable('Plan of the system', `Places about ${name}`, rich.members.filter((m) => m.offset).length)
  await asTable('Velocity against separation', `Velocities against ${name}`, rich.members.filter((m) => m.dv !== null).length)
  await asTable('Luminosity function', `Luminosity function of the satellites of ${name}`, rich.system.luminosity.steps.length)
  await asTable('Among isotropic systems', `Isotropic reshuffles of the ${name} system`, rich.system.shape?.isotropy.histogram.length ?? 0)
})

it('says the flattening in a sentence, and where the pole is', async () => {
  const page = await open(path())
  const { shape, placed } = rich.system
  const sentence = (await page.getByText(/^c\/a/).first().textContent()) ?? ''
  expect(sentence.replaceAll('\u00a0', ' ')).toContain(`c/a = ${shape?.minorToMajor.toFixed(2)} (${shape?.drawn.minorToMajor.lo.toFixed(2)}–${shape?.drawn.minorToMajor.hi.toFixed(2)}) from ${placed} satellites`)
  expect(sentence).toContain(`SGL ${shape?.pole.sgl.toFixed(0)}°, SGB +${shape?.pole.sgb.toFixed(0)}°`)
})

it('turns the plan: seen along the satellites’ plane they lie as high as the numbers say', async () => {
  const page = await open(path())
  const heights = async (): Promise<number[]> => marks(page, 'on the plan').evaluateAll((links) => links.map((link) => Number(link.querySelector('circle')?.getAttribute('cy'))))
  const spread = (list: number[]): number => Math.max(...list) - Math.min(...list)
  await page.getByText('satellites’ plane, face on').click()
  const faceOn = spread(await heights())
  await page.getByText('satellites’ plane, edge on').click()
  const edgeOn = await heights()
  expect(spread(edgeOn)).toBeLessThan(faceOn)
  // Pixels a kpc from the highest and the lowest; all others must fit.
  const normal = rich.system.shape?.axes[2] ?? [0, 0, 0]
  const above = rich.members.flatMap((m) => (m.offset ? [m.offset[0] * normal[0] + m.offset[1] * normal[1] + m.offset[2] * normal[2]] : []))
  const [first = 0, other = 0] = [above.indexOf(Math.max(...above)), above.indexOf(Math.min(...above))]
  const perKpc = ((edgeOn[other] ?? 0) - (edgeOn[first] ?? 0)) / ((above[first] ?? 0) - (above[other] ?? 0))
  above.forEach((kpc, i) => expect(Math.abs((edgeOn[i] ?? 0) - (edgeOn[first] ?? 0) - perKpc * ((above[first] ?? 0) - kpc))).toBeLessThan(0.01))
})

it('shows error bars along the line of sight when asked', async () => {
  const page = await open(path())
  const bars = page.getByRole('group', { name: `Plan of the ${rich.host.name} system` }).locator('g[clip-path] line')
  expect(await bars.count()).toBe(0)
  await page.getByText('Distance errors', { exact: true }).click()
  expect(await bars.count()).toBe(rich.members.filter((m) => m.offset && m.sight).length)
})

it('points at a satellite in all pictures and the table at once, by keyboard', async () => {
  const page = await open(path())
  const velocities = marks(page, 'by velocity and separation')
  await velocities.first().focus()
  await page.keyboard.press('ArrowRight')
  const name = ((await page.evaluate(() => document.activeElement?.getAttribute('aria-label'))) ?? '').split(',')[0] ?? ''
  expect(rich.members.map((m) => m.name)).toContain(name)
  // Its name stands beside its mark in every picture that has it, and its row is marked.
  const member = rich.members.find((m) => m.name === name)
  const drawnIn = 2 + Number(member?.absV !== null)
  await expect.poll(() => page.locator('svg text').filter({ hasText: new RegExp(`^${name}$`) }).count()).toBe(drawnIn)
  const current = page.getByRole('table', { name: `Satellites of ${rich.host.name}` }).locator('tr[aria-current]')
  expect(await current.getByRole('link').first().textContent()).toBe(name)
  await page.keyboard.press('Enter')
  await page.waitForURL(`${app.url}/galaxies/${member?.slug}`)
})

it('points from a row of the table, focused or hovered', async () => {
  const page = await open(path())
  const table = page.getByRole('table', { name: `Satellites of ${rich.host.name}` })
  const [first, second] = rich.members
  const named = (name: string | undefined) => page.getByRole('group', { name: `Plan of the ${rich.host.name} system` }).locator('text').filter({ hasText: new RegExp(`^${name}$`) })
  await table.locator('tbody tr').first().focus()
  await named(first?.name).waitFor()
  await page.keyboard.press('ArrowDown')
  await named(second?.name).waitFor()
  await table.locator('tbody tr').first().hover()
  await named(first?.name).waitFor()
})

it('saves a picture with its marks', async () => {
  const page = await open(path())
  const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: 'Download “Velocity against separation” as SVG' }).click()])
  expect(download.suggestedFilename()).toBe(`${rich.host.slug}-velocities.svg`)
  const svg = await readFile(await download.path(), 'utf8')
  expect(svg.match(/<a /g)?.length).toBe(rich.members.filter((m) => m.dv !== null).length)
  expect(svg).toContain(`Velocity against separation: satellites of ${rich.host.name}`)
})

it('says what is missing where satellites are too few, or there are none', async () => {
  const page = await open(`/hosts/${poor.host.slug}`)
  await page.getByText('Too few satellites for a shape').waitFor()
  await page.getByText(`and a shape needs ${poor.system.needed}`).waitFor()
  const { rows } = await read<{ rows: { slug: string }[] }>('/api/galaxies?host_relation=field&limit=1')
  const lonely = await open(`/hosts/${rows[0]?.slug}`)
  await lonely.getByText('No satellites', { exact: true }).waitFor()
})

it('says so when there is no such galaxy, and offers to try again', async () => {
  const before = chromium.complaints.length
  const page = await open('/hosts/nowhere-at-all')
  await page.getByText('No galaxy of this catalogue has the identifier "nowhere-at-all".', { exact: false }).waitFor()
  // The browser itself reports the missing galaxy on its console.
  chromium.complaints.splice(before)
})

it('is accessible and fits its window, wide and narrow, in Paper and in Night', async () => {
  expect(await inspectPages(app, chromium, ['/hosts', path(), `/hosts/${poor.host.slug}`])).toEqual([])
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
