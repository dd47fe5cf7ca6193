import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { goTo, inspectPages, openPage, signInAs } from './harness/pages.ts'

let app: RunningApp
let chromium: TestBrowser
/** Signed in as outreach, through all tests. */
let page: Page
let figureAddress: string

beforeAll(async () => {
  app = await startApp({ catalogue: 'demonstration' })
  chromium = await openBrowser()
  page = await chromium.newPage({ baseURL: app.url, viewport: { width: 1440, height: 900 } })
  await signInAs(app, page, 'outreach')
})
afterAll(async () => {
  await chromium?.close()
  await app?.stop()
})

it('keeps a map of the atlas in the gallery, with its filter', async () => {
  await goTo(page, '/atlas/sky?class=spiral&frame=galactic')
  await page.getByRole('button', { name: 'Export' }).click()
  const dialog = page.getByRole('dialog', { name: 'Export a figure' })
  await dialog.getByLabel('Title', { exact: true }).fill('Spirals for a poster')
  await dialog.getByRole('button', { name: 'Keep in the gallery' }).click()
  await dialog.getByRole('link', { name: 'Kept: open it' }).click()
  await page.getByRole('heading', { level: 1, name: 'Spirals for a poster' }).waitFor()
  figureAddress = new URL(page.url()).pathname
  const { total } = (await (await fetch(`${app.url}/api/galaxies?class=spiral`)).json()) as { total: number }
  await page.getByRole('img', { name: new RegExp(`^Spirals for a poster\\. ${total} galaxies on the whole sky, galactic frame`) }).waitFor()
})

it('changes a kept figure, which stays changed', async () => {
  await goTo(page, figureAddress)
  await page.getByLabel('Name', { exact: true }).fill('Spirals, in one ink')
  await page.getByText('equatorial', { exact: true }).click()
  await page.getByRole('button', { name: 'Keep the changes' }).click()
  await page.getByRole('heading', { level: 1, name: 'Spirals, in one ink' }).waitFor()
  await page.reload()
  await page.getByRole('img', { name: /equatorial frame/ }).waitFor()
})

it('warns before changes that are not kept are left', async () => {
  await goTo(page, figureAddress)
  await page.getByLabel('Name', { exact: true }).fill('Not kept')
  await page.getByRole('link', { name: 'Hosts', exact: true }).click()
  const warning = page.getByRole('alertdialog')
  await warning.getByText('The changes to this figure are not kept.').waitFor()
  await warning.getByRole('button').filter({ hasText: /stay/i }).click()
  expect(new URL(page.url()).pathname).toBe(figureAddress)
  await page.getByLabel('Name', { exact: true }).fill('Spirals, in one ink')
})

it('saves the file, with its credit line', async () => {
  await goTo(page, figureAddress)
  await page.getByText('SVG', { exact: true }).click()
  const [file] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: 'Save as SVG' }).click()])
  expect(await readFile(await file.path(), 'utf8')).toContain('Demonstration data, invented')
})

it('duplicates a figure for oneself, deletes it, and brings it back', async () => {
  await goTo(page, figureAddress)
  await page.getByRole('button', { name: 'Duplicate' }).click()
  await page.getByRole('heading', { level: 1, name: 'Spirals, in one ink (copy)' }).waitFor()
  await page.getByRole('button', { name: 'Delete' }).click()
  await page.waitForURL(`${app.url}/figures`)
  await expect.poll(() => page.getByRole('link', { name: 'Spirals, in one ink (copy)' }).count()).toBe(0)
  await page.getByRole('button', { name: 'Undo' }).click()
  await page.getByRole('heading', { level: 1, name: 'Spirals, in one ink (copy)' }).waitFor()
})

it('shows visitors the shared figures, and neither the others nor the ways to change them', async () => {
  const visitor = await openPage(app, chromium, '/figures')
  await visitor.getByRole('link', { name: 'Spirals, in one ink', exact: true }).click()
  await visitor.getByRole('heading', { level: 1, name: 'Spirals, in one ink' }).waitFor()
  expect(await visitor.getByRole('button', { name: /Delete|Duplicate|Keep the changes/ }).count()).toBe(0)
  await goTo(visitor, '/figures')
  expect(await visitor.getByRole('link', { name: /copy/ }).count()).toBe(0)
})

it('is accessible and fits its window, wide and narrow, in Paper and in Night', async () => {
  expect(await inspectPages(app, chromium, ['/figures', figureAddress])).toEqual([])
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
