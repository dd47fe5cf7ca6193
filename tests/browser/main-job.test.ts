/** The whole job on an empty catalogue: a paper's table goes in, somebody else signs it off, and a researcher and outreach take it out again. */
import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { astropyTable, votlint } from '../server/harness/judges.ts'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { goTo, signInAs } from './harness/pages.ts'

const TABLE = new URL('../reference/published.csv', import.meta.url)
const MEMBERS = new URL('../reference/membership.csv', import.meta.url)
const TITLE = 'The published sample'

let app: RunningApp
let chromium: TestBrowser

beforeAll(async () => {
  app = await startApp({ catalogue: 'empty' })
  chromium = await openBrowser()
})
afterAll(async () => {
  await chromium?.close()
  await app?.stop()
})

async function as(who: string): Promise<Page> {
  const page = await chromium.newPage({ baseURL: app.url, viewport: { width: 1440, height: 900 } })
  await signInAs(app, page, who)
  return page
}

/** What the literature says: names of the satellites of these hosts, sorted. */
async function satellitesOf(...hosts: string[]): Promise<string[]> {
  const lines = (await readFile(MEMBERS, 'utf8')).trim().split('\n').slice(1)
  return lines.map((line) => line.split(',')).filter(([, host]) => hosts.includes(host ?? '')).map(([name]) => name ?? '').sort()
}

async function saved(page: Page, press: () => Promise<void>): Promise<{ name: string; bytes: Buffer }> {
  const [file] = await Promise.all([page.waitForEvent('download'), press()])
  return { name: file.suggestedFilename(), bytes: await readFile(await file.path()) }
}

describe('on an empty catalogue', () => {
  it('a curator imports a table, makes a draft and submits it', async () => {
    const page = await as('curator')
    await goTo(page, '/import')
    await page.getByText('No table yet').waitFor()
    await page.locator('input[type=file]').setInputFiles(TABLE.pathname)
    await page.getByRole('heading', { level: 1, name: 'published.csv' }).waitFor()
    const count = (label: string): Promise<string> => page.locator('dl > div').filter({ has: page.getByText(label, { exact: true }) }).locator('dd').innerText()
    expect([await count('rows'), await count('in order'), await count('to mend'), await count('new galaxies')]).toEqual(['289', '289', '0', '58'])
    await page.getByLabel('Title').fill(TITLE)
    await page.getByRole('button', { name: 'Make a draft of 289 rows' }).click()
    await page.getByRole('link', { name: 'Open the draft' }).click()
    await page.getByRole('heading', { level: 1, name: TITLE }).waitFor()
    await page.getByText('347 changes').first().waitFor()
    await page.getByRole('button', { name: 'Submit for review' }).click()
    await page.getByText('submitted', { exact: true }).first().waitFor()
    await page.context().close()
  })

  it('an approver reads the effect and the checks, and approves', async () => {
    const page = await as('approver')
    await goTo(page, '/review')
    await page.getByRole('heading', { level: 1, name: TITLE }).waitFor()
    const effect = page.locator('section').filter({ has: page.getByRole('heading', { name: 'Effect before approval' }) })
    await effect.getByText('289 measurements, 58 galaxies added', { exact: false }).waitFor()
    await effect.getByRole('row').filter({ hasText: 'M 31 system' }).getByText('gains', { exact: false }).waitFor()
    expect(await page.getByRole('list', { name: 'Automatic checks' }).getByRole('listitem').count()).toBeGreaterThan(0)
    expect(await page.getByText('cautions').count()).toBeGreaterThan(0)
    await page.keyboard.press('a')
    await page.getByText('This makes revision 2', { exact: false }).waitFor()
    await page.keyboard.press('Enter')
    await page.getByText('Approved as revision 2. Nothing is left.').first().waitFor()
    await page.getByText('The queue is empty').waitFor()
    await page.context().close()
  })

  it('a researcher finds the satellites of two hosts as the literature has them, and downloads them', async () => {
    const wanted = await satellitesOf('Milky Way', 'M 31')
    expect(wanted.length).toBe(18)
    const page = await as('researcher')
    await goTo(page, '/galaxies?host=milky-way,m-31')
    const table = page.getByRole('table', { name: 'Galaxies' })
    await table.getByRole('rowheader').first().waitFor()
    expect((await table.getByRole('rowheader').allInnerTexts()).map((text) => text.trim()).sort()).toEqual(wanted)

    const download = async (item: string): Promise<Buffer> => {
      await page.getByRole('button', { name: 'Download' }).click()
      return (await saved(page, () => page.getByRole('menuitem', { name: item }).click())).bytes
    }
    const csv = (await download('CSV, columns shown')).toString('utf8').trim().split(/\r?\n/)
    const at = csv[0]?.split(',').indexOf('name') ?? -1
    expect(csv.slice(1).map((line) => line.split(',')[at]).sort()).toEqual(wanted)
    const votable = await download('VOTable, all columns')
    expect(await votlint(votable)).toEqual([])
    const { columns } = await astropyTable(votable)
    expect(columns['name']?.map(String).sort()).toEqual(wanted)
    await page.context().close()
  })

  it('outreach exports an all-sky and a plane figure', async () => {
    const page = await as('outreach')
    const save = async (path: string, format: string): Promise<Buffer> => {
      await goTo(page, path)
      await page.getByRole('button', { name: 'Export' }).click()
      const dialog = page.getByRole('dialog', { name: 'Export a figure' })
      await dialog.getByText(format, { exact: true }).click()
      const { name, bytes } = await saved(page, () => dialog.getByRole('button', { name: `Save as ${format}` }).click())
      expect(name).toMatch(new RegExp(`\\.${format.toLowerCase()}$`))
      return bytes
    }
    const sky = (await save('/atlas/sky', 'SVG')).toString('utf8')
    expect(sky).toContain('<svg')
    expect(sky).toMatch(/width="\d+(\.\d+)?mm"/)
    expect((await save('/atlas/plane', 'PDF')).subarray(0, 5).toString('latin1')).toBe('%PDF-')
    await page.context().close()
  })
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
