import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { goTo, overflowOf, signInAs, violationsOf } from './harness/pages.ts'

const TABLE = `galaxy,ra,dec,quantity,value,err,unit,method,source,remark
Ostrel,,,distance,24.76,0.05,mag,TRGB,Harrow+2026 Invented 1 2,fine
Ostrel,,,velocity,fast,2,km/s,,Harrow+2026 Invented 1 2,cannot be read
Mirrow,,,velocity,620,2,km/s,,nobody knows,gives no year
Newcomer,12.5,-40.1,velocity,120,2,km/s,,Harrow+2026 Invented 1 2,a new galaxy
`

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

async function begin(options: Parameters<TestBrowser['newPage']>[0] = {}): Promise<Page> {
  const page = await chromium.newPage({ baseURL: app.url, viewport: { width: 1440, height: 900 }, ...options })
  await signInAs(app, page, 'curator')
  await goTo(page, '/import')
  return page
}

async function bring(page: Page, text: string, name = 'table.csv'): Promise<void> {
  await page.locator('input[type=file]').setInputFiles({ name, mimeType: 'text/csv', buffer: Buffer.from(text) })
}

async function bringTable(page: Page): Promise<void> {
  await bring(page, TABLE)
  await page.getByRole('heading', { level: 1, name: 'table.csv' }).waitFor()
  await page.getByRole('button', { name: 'Mend row 2' }).waitFor()
}

const count = (page: Page, label: string) => page.locator('dl > div').filter({ has: page.getByText(label, { exact: true }) }).locator('dd')

describe('a table', () => {
  it('that is none is refused in a sentence, and the page goes on', async () => {
    const page = await begin()
    const before = chromium.complaints.length
    await bring(page, 'one column\nalone\n')
    await page.getByRole('alert').getByText('only one column', { exact: false }).waitFor()
    await bring(page, '', 'empty.csv')
    await page.getByRole('alert').getByText('empty', { exact: false }).waitFor()
    // The browser itself reports the refused requests on its console.
    chromium.complaints.splice(before)
    await bringTable(page)
  })

  it('is guessed, its rows mended in place or left out, and drafted; bad rows stay', async () => {
    const page = await begin()
    await bringTable(page)
    await expect.poll(() => count(page, 'in order').innerText()).toBe('2')
    await page.getByText('"fast" cannot be read as a value', { exact: false }).first().waitFor()

    await page.getByRole('button', { name: 'Mend row 2' }).click()
    const row = page.getByRole('form', { name: 'Row 2' })
    await row.getByLabel('value', { exact: true }).fill('31.5')
    await row.getByRole('button', { name: 'Save and read again' }).click()
    await expect.poll(() => count(page, 'in order').innerText()).toBe('3')
    await page.getByRole('button', { name: 'Make a draft of 3 rows' }).click()
    await page.getByText('1 row to mend stays', { exact: false }).or(page.getByText('1 row to mend stay', { exact: false })).first().waitFor()

    await page.getByRole('button', { name: 'Mend row 3' }).click()
    const other = page.getByRole('form', { name: 'Row 3' })
    await other.getByLabel('Why it is left out').fill('no source that can be looked up')
    await other.getByRole('button', { name: 'Leave it out' }).click()
    await expect.poll(() => count(page, 'left out').innerText()).toBe('1')

    await page.getByRole('link', { name: 'Open the draft' }).click()
    await page.getByRole('heading', { level: 1, name: 'table' }).waitFor()
    await page.getByText('Newcomer, a new galaxy').first().waitFor()
    await goTo(page, '/import')
    await page.getByRole('table', { name: 'Your imports' }).getByRole('link', { name: /^submission/ }).first().waitFor()
  })

  it('is read anew when the curator says what a column holds, and a choice that cannot be is explained beside it', async () => {
    const page = await begin()
    await bringTable(page)
    const role = async (column: string, choice: string): Promise<void> => {
      await page.getByRole('button', { name: new RegExp(`Role of ${column}$`) }).click()
      await page.getByRole('option', { name: new RegExp(`^${choice}`) }).first().click()
    }
    const before = chromium.complaints.length
    await role('remark', 'source')
    await page.getByText('cannot both hold this', { exact: false }).first().waitFor()
    chromium.complaints.splice(before)
    await role('source', 'left aside')
    await expect.poll(() => count(page, 'in order').innerText()).toBe('0')
    await role('remark', 'note')
    await role('source', 'source')
    await expect.poll(() => count(page, 'in order').innerText()).toBe('2')
  })
})

it.each([['light', 1440], ['dark', 390]] as const)('is accessible and fits its window, %s, %i px', async (colorScheme, width) => {
  const page = await begin({ colorScheme, viewport: { width, height: 900 } })
  expect(await violationsOf(page)).toEqual([])
  await bringTable(page)
  await page.getByRole('button', { name: 'Mend row 2' }).click()
  expect(await violationsOf(page)).toEqual([])
  expect(await overflowOf(page)).toBeLessThanOrEqual(0)
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
