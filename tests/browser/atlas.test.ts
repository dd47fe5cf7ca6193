import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { inspectPages, openPage } from './harness/pages.ts'

let app: RunningApp
let chromium: TestBrowser

beforeAll(async () => {
  app = await startApp({ catalogue: 'demonstration' })
  chromium = await openBrowser()
})
afterAll(async () => {
  await chromium?.close()
  await app?.stop()
})

const open = (path: string): Promise<Page> => openPage(app, chromium, path, { viewport: { width: 1440, height: 900 } })
const parameter = (page: Page, name: string): string | null => new URL(page.url()).searchParams.get(name)

/** Pixels of the map that are not empty. */
function inked(page: Page): Promise<number> {
  return page.evaluate(() => {
    const canvas = document.querySelector('canvas')
    const data = canvas?.getContext('2d')?.getImageData(0, 0, canvas.width, canvas.height).data ?? []
    let count = 0
    for (let i = 3; i < data.length; i += 4) if (data[i]) count++
    return count
  })
}

describe('the sky', () => {
  it('is drawn, and turns to another frame, which stands in the address', async () => {
    const page = await open('/atlas/sky')
    await page.getByRole('heading', { name: 'The sky, supergalactic frame' }).waitFor()
    expect(await inked(page)).toBeGreaterThan(50_000)
    await page.getByText('galactic', { exact: true }).click()
    await page.getByRole('heading', { name: 'The sky, galactic frame' }).waitFor()
    expect(parameter(page, 'frame')).toBe('galactic')
    await page.reload()
    await page.getByRole('heading', { name: 'The sky, galactic frame' }).waitFor()
  })

  it('is walked by arrow keys from galaxy to galaxy, and opens one by Enter', async () => {
    const page = await open('/atlas/sky')
    const map = page.getByRole('application', { name: /^The sky/ })
    await map.focus()
    await page.keyboard.press('Home')
    await page.waitForURL(/galaxy=/)
    const first = parameter(page, 'galaxy')
    await page.keyboard.press('ArrowRight')
    await expect.poll(() => parameter(page, 'galaxy')).not.toBe(first)
    const second = parameter(page, 'galaxy')
    const { designation } = (await (await fetch(`${app.url}/api/galaxies/${second}`)).json()) as { designation: string }
    await page.getByRole('heading', { name: designation, exact: true }).waitFor()
    await page.keyboard.press('Escape')
    await expect.poll(() => parameter(page, 'galaxy')).toBeNull()
    await page.keyboard.press('Home')
    await expect.poll(() => parameter(page, 'galaxy')).toBe(first)
    await page.keyboard.press('Enter')
    await page.waitForURL(`${app.url}/galaxies/${first}`)
  })

  it('tells what the pointer is on, and chooses it by a click', async () => {
    const { rows } = (await (await fetch(`${app.url}/api/galaxies?sort=abs_v&limit=1`)).json()) as { rows: { slug: string; name: string }[] }
    const [brightest] = rows
    const page = await open(`/atlas/sky?galaxy=${brightest?.slug}`)
    const ring = page.getByRole('application').locator('circle')
    await ring.waitFor({ state: 'attached' })
    const box = await ring.boundingBox()
    if (!box) throw new Error('the chosen galaxy is not marked')
    await page.keyboard.press('Escape')
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2]
    // Far from every galaxy: the choice is let go.
    const map = await page.getByRole('application').boundingBox()
    await page.mouse.click((map?.x ?? 0) + 3, (map?.y ?? 0) + 3)
    await expect.poll(() => parameter(page, 'galaxy')).toBeNull()
    await page.mouse.move(x, y)
    await page.getByRole('application').getByText('Mpc', { exact: false }).first().waitFor()
    await page.mouse.click(x, y)
    await page.waitForURL(/galaxy=/)
  })

  it('keeps the filter on the way to the table and to the plane', async () => {
    const page = await open('/atlas/sky?class=spiral&frame=galactic')
    const { total } = (await (await fetch(`${app.url}/api/galaxies?class=spiral`)).json()) as { total: number }
    await page.getByText(`${total} galaxies · release`, { exact: false }).waitFor()
    await page.getByRole('link', { name: 'As a table' }).click()
    await page.waitForURL(`${app.url}/galaxies?class=spiral`)
    await page.goBack()
    await page.getByRole('link', { name: 'The plane' }).click()
    await page.waitForURL(`${app.url}/atlas/plane?class=spiral`)
  })
})

describe('the plane', () => {
  it('shows both sections, linked, and is drawn about a galaxy', async () => {
    const { rows } = (await (await fetch(`${app.url}/api/galaxies?host_relation=host&sort=distance&limit=1`)).json()) as { rows: { slug: string; name: string }[] }
    const [host] = rows
    const page = await open(`/atlas/plane?galaxy=${host?.slug}`)
    const maps = page.getByRole('application')
    expect(await maps.count()).toBe(2)
    for (const axes of ['SGX–SGY', 'SGX–SGZ']) await page.getByRole('application', { name: `The ${axes} plane` }).locator('circle').waitFor({ state: 'attached' })
    await page.getByRole('button', { name: 'Centre here' }).click()
    await page.getByRole('heading', { name: `Round ${host?.name}` }).waitFor()
    expect(parameter(page, 'about')).toBe(host?.slug)
    await page.getByRole('button', { name: 'Back to the observer' }).click()
    await page.getByRole('heading', { name: 'The supergalactic plane' }).waitFor()
  })
})

describe('export', () => {
  it.each([
    ['/atlas/sky', 'SVG', (file: Buffer) => file.toString('utf8').includes('<svg')],
    ['/atlas/sky', 'PNG', (file: Buffer) => file.subarray(1, 4).toString('latin1') === 'PNG'],
    ['/atlas/plane', 'PDF', (file: Buffer) => file.subarray(0, 5).toString('latin1') === '%PDF-'],
  ])('saves %s as %s at the size that is asked for', async (path, format, isRight) => {
    const page = await open(path)
    await page.getByRole('button', { name: 'Export' }).click()
    const dialog = page.getByRole('dialog', { name: 'Export a figure' })
    await dialog.getByText(format, { exact: true }).click()
    await dialog.getByText('88 mm', { exact: true }).click()
    await dialog.getByLabel('Title', { exact: true }).fill('Neighbours, drawn for a test')
    expect(await dialog.getByLabel('Credit line').inputValue()).toBe('Demonstration data, invented')
    const [file] = await Promise.all([page.waitForEvent('download'), dialog.getByRole('button', { name: `Save as ${format}` }).click()])
    expect(file.suggestedFilename()).toMatch(new RegExp(`\\.${format.toLowerCase()}$`))
    const bytes = await readFile(await file.path())
    expect(isRight(bytes)).toBe(true)
    if (format === 'SVG') expect(bytes.toString('utf8')).toContain('88mm')
    // A visitor may save, but not keep.
    expect(await dialog.getByRole('button', { name: 'Keep in the gallery' }).count()).toBe(0)
  })
})

it('stands live on the first page and leads into the atlas', async () => {
  const page = await open('/')
  const map = page.getByRole('application', { name: /^The sky/ })
  await map.waitFor()
  await map.focus()
  await page.keyboard.press('Home')
  await page.waitForURL(/\/atlas\/sky\?galaxy=/)
})

it('is accessible and fits its window, wide and narrow, in Paper and in Night', async () => {
  expect(await inspectPages(app, chromium, ['/atlas/sky?galaxy=ostrel', '/atlas/plane', '/'])).toEqual([])
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
