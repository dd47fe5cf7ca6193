import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, it } from 'vitest'
import type { GalaxyAnswer, MeasurementAnswer } from '../../core/schema/catalogue.ts'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { inspectPages, openPage, signInAs, goTo } from './harness/pages.ts'

let app: RunningApp
let chromium: TestBrowser
let galaxy: GalaxyAnswer
let measurements: MeasurementAnswer[]

async function read<Answer>(path: string): Promise<Answer> {
  return (await (await fetch(`${app.url}${path}`)).json()) as Answer
}

beforeAll(async () => {
  app = await startApp({ catalogue: 'demonstration' })
  chromium = await openBrowser()
  const { rows } = await read<{ rows: { slug: string }[] }>('/api/galaxies?host_relation=satellite&sort=-n_distance_all&limit=1')
  galaxy = await read(`/api/galaxies/${rows[0]?.slug}`)
  measurements = (await read<{ measurements: MeasurementAnswer[] }>(`/api/galaxies/${galaxy.slug}/measurements`)).measurements
})
afterAll(async () => {
  await chromium?.close()
  await app?.stop()
})

const open = (path: string): Promise<Page> => openPage(app, chromium, path, { viewport: { width: 1440, height: 900 } })
const path = (): string => `/galaxies/${galaxy.slug}`

it('shows the adopted distance with its errors, its host, and every distance with its weight', async () => {
  const page = await open(path())
  expect(await page.getByRole('heading', { level: 1 }).textContent()).toBe(galaxy.designation)
  const distance = Number(galaxy.row.distance)
  await page.getByText('adopted distance').locator('..').getByText(distance.toFixed(distance < 1 ? 3 : 2), { exact: true }).waitFor()
  await page.getByText(`satellite of ${galaxy.host?.name}, probability ${Number(galaxy.row.host_probability).toFixed(2)}`).waitFor()
  const adopted = galaxy.adopted.find((one) => one.quantity === 'distance_modulus')
  const picture = page.getByRole('img', { name: /^distance modulus on the catalogue’s scale/ })
  const words = (await picture.getAttribute('aria-label')) ?? ''
  for (const reason of adopted?.reasons ?? []) {
    const source = measurements.find((m) => m.id === reason.measurementId)?.source.label ?? 'no source'
    expect(words).toContain(source)
  }
  expect(words).toContain(`Adopted: ${adopted?.value?.toFixed(2)}`)
  await page.getByText(adopted?.sentence ?? 'no sentence').first().waitFor()
})

it('opens a quantity to the reasons, and lists every measurement', async () => {
  const page = await open(path())
  const adopted = galaxy.adopted.find((one) => one.quantity === 'distance_modulus')
  await page.locator('summary').filter({ hasText: 'Distance modulus' }).click()
  const reasons = page.getByRole('table', { name: 'Distance modulus: reasons' })
  await expect.poll(() => reasons.locator('tbody tr').count()).toBe(adopted?.reasons.length)
  expect(await page.getByRole('table', { name: `Measurements of ${galaxy.designation}` }).locator('tbody tr').count()).toBe(measurements.length)
  expect(await page.getByRole('link', { name: 'Add a measurement' }).count()).toBe(0)
})

it('leads a curator to the change of a measurement', async () => {
  const page = await chromium.newPage({ baseURL: app.url, viewport: { width: 1440, height: 900 } })
  await signInAs(app, page, 'curator')
  await goTo(page, path())
  await page.getByRole('link', { name: 'Add a measurement' }).waitFor()
  const [first] = measurements.filter((m) => m.quantity === 'distance_modulus')
  await page.getByRole('link', { name: `Mend the distance modulus of ${first?.source.label}` }).first().click()
  await page.getByRole('heading', { name: 'New submission' }).waitFor()
  const asked = new URL(page.url()).searchParams
  expect([asked.get('add'), asked.get('galaxy')]).toEqual(['measurement.replace', galaxy.slug])
  expect(measurements.map((m) => String(m.id))).toContain(asked.get('measurement'))
  await page.getByRole('button', { name: 'Begin the draft' }).click()
  await page.waitForURL(/\/submissions\/\d+\?/)
  expect(new URL(page.url()).searchParams.get('measurement')).toBe(asked.get('measurement'))
})

it('leads from an earlier identifier to the present one', async () => {
  const { knex } = app.database
  await knex.raw(
    `insert into galaxy_versions (galaxy, designation, slug, status, ra, dec, class, rev_from, rev_to)
     select galaxy, 'Formerly so', 'formerly-so', status, ra, dec, class, 1, 2 from galaxy_versions where slug = ? and rev_to is null`,
    [galaxy.slug],
  )
  const page = await open('/galaxies/formerly-so')
  await page.waitForURL(`${app.url}${path()}`)
  expect(await page.getByRole('heading', { level: 1 }).textContent()).toBe(galaxy.designation)
})

it('offers near names for one that is not there', async () => {
  const before = chromium.complaints.length
  const page = await open(`/galaxies/${galaxy.slug.replace('-', '')}`)
  await page.getByRole('link', { name: galaxy.designation, exact: false }).first().waitFor()
  // The browser itself reports the missing galaxy on its console.
  chromium.complaints.splice(before)
})

it('is accessible and fits its window, wide and narrow, in Paper and in Night', async () => {
  const { rows } = await read<{ rows: { slug: string }[] }>('/api/galaxies?host_relation=host&limit=1')
  expect(await inspectPages(app, chromium, [path(), `/galaxies/${rows[0]?.slug}`])).toEqual([])
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
