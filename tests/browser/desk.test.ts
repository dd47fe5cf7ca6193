import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { goTo, overflowOf, signInAs, violationsOf } from './harness/pages.ts'

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

async function as(who: string, path: string, options: Parameters<TestBrowser['newPage']>[0] = {}): Promise<Page> {
  const page = await chromium.newPage({ baseURL: app.url, viewport: { width: 1440, height: 900 }, ...options })
  await signInAs(app, page, who)
  await goTo(page, path)
  return page
}

async function begin(page: Page, title: string): Promise<void> {
  await goTo(page, '/submissions/new')
  await page.getByLabel('Title').fill(title)
  await page.getByRole('button', { name: 'Begin the draft' }).click()
  await page.getByRole('heading', { level: 1, name: title }).waitFor()
}

async function choose(page: Page, field: string, words: string, option = words): Promise<void> {
  const box = page.getByRole('combobox', { name: field, exact: true })
  await box.click()
  await box.pressSequentially(words)
  await page.getByRole('option', { name: new RegExp(`^${option}`) }).first().click()
}

const kind = (page: Page, name: string) => page.getByRole('group', { name: 'Kinds of change' }).getByRole('button', { name, exact: true }).click()
const add = (page: Page) => page.getByRole('button', { name: 'Add to the draft' }).click()
const card = (page: Page, text: string) => page.getByRole('article').filter({ hasText: text })

describe('a draft', () => {
  it('takes changes of all six kinds, shows their effect, and is submitted', async () => {
    const page = await as('curator', '/')
    await begin(page, 'One change of each kind')

    await choose(page, 'Galaxy', 'Ostrel II', 'Ostrel II')
    await page.getByLabel('Value, as published').fill('24.20 ± 0.06')
    await page.getByLabel('Value, as published').blur()
    expect(await page.getByLabel('Error +').inputValue()).toBe('0.06')
    await choose(page, 'Method', 'TRGB')
    await choose(page, 'Source', 'Harrow')
    await add(page)
    await card(page, 'new measurement').getByText('24.2', { exact: false }).first().waitFor()

    await kind(page, 'Galaxy')
    await page.getByLabel('Designation').fill('Made In A Browser')
    await page.getByLabel('Position, ICRS').fill('00 52 44.3 +31 16 09')
    await add(page)
    await card(page, 'Made In A Browser, a new galaxy').waitFor()

    await kind(page, 'Name')
    await choose(page, 'Galaxy', 'Ostrel III')
    await page.getByLabel('Name', { exact: true }).fill('Third of the browser')
    await add(page)
    await card(page, 'Third of the browser').waitFor()

    await kind(page, 'Amend a galaxy')
    await choose(page, 'Galaxy', 'Ostrel V', 'Ostrel V')
    await page.getByLabel('Designation').fill('Ostrel V Prime')
    await page.getByLabel('Reason').fill('Renamed by its finders')
    await add(page)
    await card(page, 'galaxy amended').getByText('Ostrel V Prime').first().waitFor()

    await kind(page, 'Mend a measurement')
    await choose(page, 'Galaxy', 'Mirrow', 'Mirrow')
    await page.getByRole('radiogroup', { name: 'Measurement' }).locator('label').filter({ hasText: 'Heliocentric velocity' }).first().click()
    await page.getByLabel('Value, as published').fill('601.5')
    await page.getByLabel('Reason').fill('The digits were interchanged')
    await add(page)
    await card(page, 'mended measurement').waitFor()

    await kind(page, 'Exclude a measurement')
    await choose(page, 'Galaxy', 'Ostrel VI', 'Ostrel VI')
    await page.getByRole('radiogroup', { name: 'Measurement' }).locator('label').filter({ hasText: 'Distance modulus' }).first().click()
    await page.getByLabel('Reason').fill('Superseded by the same team')
    await add(page)
    await card(page, 'measurement excluded').waitFor()

    await page.getByText('6 changes', { exact: false }).first().waitFor()
    await page.getByRole('row').filter({ hasText: 'Made In A Browser' }).getByText('new').waitFor()
    await page.getByRole('button', { name: 'Submit for review' }).click()
    await page.getByText('submitted', { exact: true }).first().waitFor()
    await page.getByRole('button', { name: 'Withdraw' }).click()
    await page.getByText('withdrawn', { exact: true }).first().waitFor()
  })

  it('says beside each field what is wrong, and keeps what was typed over a reload', async () => {
    const page = await as('curator', '/')
    await begin(page, 'With slips')
    await choose(page, 'Galaxy', 'Ostrel II', 'Ostrel II')
    await page.getByLabel('Value, as published').fill('249.2')
    await add(page)
    await page.getByText('Choose the source.').first().waitFor()
    await page.getByText('is outside 14 to 33', { exact: false }).first().waitFor()
    await page.waitForTimeout(600)
    await page.reload()
    await page.getByLabel('Value, as published').waitFor()
    expect(await page.getByLabel('Value, as published').inputValue()).toBe('249.2')
  })

  it('saves title and summary as they are typed', async () => {
    const page = await as('curator', '/')
    await begin(page, 'Before')
    await page.getByLabel('Title').fill('After')
    await page.getByLabel('Summary').fill('Typed and never sent by hand.')
    await page.getByRole('heading', { level: 1, name: 'After' }).waitFor()
    await page.getByText(/^Saved \d\d:\d\d/).waitFor()
    await page.reload()
    await page.getByRole('heading', { level: 1, name: 'After' }).waitFor()
    expect(await page.getByLabel('Summary').inputValue()).toBe('Typed and never sent by hand.')
  })

  it('gives a removed change back, and goes when it is deleted', async () => {
    const page = await as('curator', '/')
    await begin(page, 'To be deleted')
    await kind(page, 'Name')
    await choose(page, 'Galaxy', 'Ostrel III')
    await page.getByLabel('Name', { exact: true }).fill('Short-lived')
    await add(page)
    await card(page, 'Short-lived').getByRole('button', { name: 'Remove' }).click()
    await card(page, 'Short-lived').waitFor({ state: 'detached' })
    await page.getByRole('button', { name: 'Undo' }).click()
    await card(page, 'Short-lived').waitFor()
    await page.getByRole('button', { name: 'Delete the draft' }).click()
    await page.getByRole('alertdialog').getByRole('button', { name: 'Delete', exact: true }).click()
    await page.getByRole('heading', { level: 1, name: 'Submissions' }).waitFor()
    await page.getByRole('link', { name: 'A slip in a velocity' }).waitFor()
    expect(await page.getByRole('link', { name: 'To be deleted' }).count()).toBe(0)
  })
})

it.each([['light', 1440], ['dark', 390]] as const)('is accessible and fits its window, %s, %i px', async (colorScheme, width) => {
  const page = await as('curator', '/submissions', { colorScheme, viewport: { width, height: 900 } })
  const drafts = page.getByRole('link', { name: /^(A slip|Velocity of|TRGB distances|Two old)/ })
  await drafts.first().waitFor()
  const addresses = await drafts.evaluateAll((links) => links.map((link) => link.getAttribute('href') ?? ''))
  expect(addresses).toHaveLength(4)
  for (const path of ['/submissions', '/submissions/new', ...addresses, `${addresses[0]}?add=measurement.add`, `${addresses[0]}?add=galaxy.amend`]) {
    await goTo(page, path)
    expect(await violationsOf(page), path).toEqual([])
    expect(await overflowOf(page), path).toBeLessThanOrEqual(0)
  }
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
