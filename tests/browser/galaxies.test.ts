import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { inspectPages, openPage, violationsOf } from './harness/pages.ts'

interface List {
  rows: { slug: string; name: string; host: string | null; distance: number | null }[]
  total: number
}

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

const open = (path: string, options = {}): Promise<Page> => openPage(app, chromium, path, { viewport: { width: 1440, height: 900 }, ...options })

async function list(query: string): Promise<List> {
  return (await (await fetch(`${app.url}/api/galaxies?${query}`)).json()) as List
}

/** Names in the table's first column. */
async function names(page: Page): Promise<string[]> {
  return page.getByRole('table', { name: 'Galaxies' }).getByRole('rowheader').getByRole('link').allTextContents()
}

async function twoHosts(): Promise<{ slug: string; name: string }[]> {
  const { rows } = await list('host_relation=host&sort=distance&limit=2')
  expect(rows).toHaveLength(2)
  return rows
}

describe('filtering', () => {
  it('holds the satellites of two hosts, writes them into the address and says them in a sentence', async () => {
    const [first, second] = await twoHosts()
    const page = await open('/galaxies')
    const filters = page.getByRole('complementary', { name: 'Filters' })
    for (const host of [first, second]) {
      const choice = filters.locator('label').filter({ hasText: new RegExp(`^${host?.name} ?\\d+$`) })
      if ((await choice.count()) === 0) await filters.getByRole('button', { name: /^All \d+$/ }).first().click()
      await choice.click()
    }
    const wanted = await list(`host=${first?.slug},${second?.slug}&limit=500`)
    await page.getByRole('status').getByText(`${wanted.total} galaxies`, { exact: true }).waitFor()
    expect(new URL(page.url()).searchParams.get('host')?.split(',').sort()).toEqual([first?.slug, second?.slug].sort())
    expect(await names(page)).toEqual(wanted.rows.map((row) => row.name))
    await page.getByText(`Satellites of ${first?.name} or ${second?.name}.`).waitFor()
    await page.getByRole('button', { name: `Remove the filter “${second?.name}”` }).click()
    const one = await list(`host=${first?.slug}`)
    await page.getByRole('status').getByText(`${one.total} galaxies`, { exact: true }).waitFor()
    await page.goBack()
    await page.getByRole('status').getByText(`${wanted.total} galaxies`, { exact: true }).waitFor()
  })

  it('narrows a range from the keyboard', async () => {
    const page = await open('/galaxies')
    const lower = page.getByRole('slider', { name: 'Distance, from' })
    await lower.focus()
    for (let i = 0; i < 3; i++) await page.keyboard.press('PageUp')
    await page.waitForURL(/distance=/)
    // The address follows the slider from step to step.
    await expect
      .poll(async () => {
        const range = new URL(page.url()).searchParams.get('distance') ?? ''
        const { total } = await list(`distance=${range}`)
        return /^[\d.]+\.\.$/.test(range) && (await page.getByRole('status').getByText(new RegExp(`^(\\d+ of )?${total} galaxies( loaded)?$`)).count()) > 0
      }, { timeout: 15_000 })
      .toBe(true)
  })

  it('says which filters leave nothing, and lifts one', async () => {
    const page = await open('/galaxies?class=dwarf-spheroidal&abs_v=..-20')
    await page.getByText('No galaxy passes these filters').waitFor()
    const { total } = await list('abs_v=..-20')
    expect(total).toBeGreaterThan(0)
    const offer = page.getByRole('listitem').filter({ has: page.getByRole('button', { name: 'Remove “dwarf spheroidal”' }) }).filter({ hasText: `${total} galax` })
    await offer.getByRole('button').click()
    await page.getByRole('status').getByText(`${total} galaxies`, { exact: true }).waitFor()
  })

  it('names what of an address it cannot understand, and goes on without it', async () => {
    const page = await open('/galaxies?distance=5..2&class=spiral')
    await page.getByRole('alert').getByText('Write the smaller end first', { exact: false }).waitFor()
    await page.getByRole('button', { name: 'Leave “distance” out' }).click()
    const { total } = await list('class=spiral')
    await page.getByRole('status').getByText(`${total} galaxies`, { exact: true }).waitFor()
  })
})

describe('the table', () => {
  it('is searched, walked and opened from the keyboard', async () => {
    const { rows } = await list('sort=-n_measurements&limit=1')
    const [galaxy] = rows
    const page = await open('/galaxies')
    await page.keyboard.press('/')
    await page.keyboard.type(galaxy?.name ?? '')
    await page.waitForURL(/q=/)
    const found = await list(new URLSearchParams({ q: galaxy?.name ?? '', limit: '500' }).toString())
    await page.getByRole('status').getByText(found.total === 1 ? '1 galaxy' : `${found.total} galaxies`, { exact: true }).waitFor()
    const index = found.rows.findIndex((row) => row.slug === galaxy?.slug)
    await page.getByRole('table', { name: 'Galaxies' }).locator('tbody tr').first().focus()
    for (let i = 0; i < index; i++) await page.keyboard.press('ArrowDown')
    await page.keyboard.press('Enter')
    await page.waitForURL(`${app.url}/galaxies/${galaxy?.slug}`)
  })

  it('is sorted by the server and goes on to the last row', async () => {
    const page = await open('/galaxies')
    await page.getByRole('columnheader', { name: /^D/ }).getByRole('button').click()
    await page.waitForURL(/sort=distance/)
    const { rows, total } = await list('sort=distance&limit=5')
    const [last] = (await list('sort=-distance&limit=1')).rows
    await expect.poll(async () => (await names(page)).slice(0, 5)).toEqual(rows.map((row) => row.name))
    // The further pages are asked for as the end comes near.
    await page.getByRole('table', { name: 'Galaxies' }).locator('tbody tr[tabindex="0"]').focus()
    const whole = page.getByRole('status').getByText(`${total} galaxies`, { exact: true })
    await expect
      .poll(async () => {
        await page.keyboard.press('End')
        return whole.count()
      }, { timeout: 15_000 })
      .toBe(1)
    await page.keyboard.press('End')
    await expect.poll(async () => (await names(page)).at(-1)).toBe(last?.name)
  })

  it('shows the columns that are chosen, and downloads all rows of the filter', async () => {
    const [host] = await twoHosts()
    const page = await open(`/galaxies?host=${host?.slug}`)
    await page.getByRole('button', { name: 'Columns' }).click()
    await page.getByRole('dialog', { name: 'Columns' }).locator('label').filter({ hasText: /^Right ascension/ }).click()
    await page.getByRole('button', { name: 'Done' }).click()
    await page.getByRole('columnheader', { name: /^RA/ }).waitFor()
    expect(new URL(page.url()).searchParams.get('columns')).toContain('ra')
    const { total } = await list(`host=${host?.slug}`)
    for (const [item, begins, count] of [
      ['CSV, columns shown', 'name,', (text: string) => text.trim().split(/\r?\n/).length - 1],
      ['VOTable, all columns', '<?xml', (text: string) => text.match(/<TR>/g)?.length ?? 0],
    ] as const) {
      await page.getByRole('button', { name: 'Download' }).click()
      const [file] = await Promise.all([page.waitForEvent('download'), page.getByRole('menuitem', { name: item }).click()])
      const text = await readFile(await file.path(), 'utf8')
      expect(text.startsWith(begins)).toBe(true)
      expect(count(text)).toBe(total)
    }
  })

  it('is read as of an earlier release', async () => {
    const page = await open('/galaxies?at=2026.1')
    await page.getByText('as of release 2026.1').waitFor()
    const [before, now] = await Promise.all([list('at=2026.1'), list('')])
    expect(before.total).toBeLessThan(now.total)
    await page.getByText(`${before.total} galaxies · release 2026.1`).waitFor()
    await page.getByRole('button', { name: 'Read the newest again' }).click()
    await page.waitForURL(`${app.url}/galaxies`)
  })
})

it('folds its filters into a drawer on a narrow screen', async () => {
  const page = await open('/galaxies', { viewport: { width: 390, height: 844 } })
  await page.getByRole('button', { name: 'Filters' }).click()
  const drawer = page.getByRole('dialog', { name: 'Filters' })
  await drawer.locator('label').filter({ hasText: /^Spiral/ }).click()
  const { total } = await list('class=spiral')
  await drawer.getByRole('button', { name: `Show ${total} galaxies` }).click()
  await page.getByRole('button', { name: 'Filters (1)' }).waitFor()
  expect(await violationsOf(page)).toEqual([])
})

it('is accessible and fits its window, wide and narrow, in Paper and in Night', async () => {
  expect(await inspectPages(app, chromium, ['/galaxies', '/galaxies?class=dwarf-spheroidal&abs_v=..-20', '/galaxies?nonsense=1'])).toEqual([])
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
