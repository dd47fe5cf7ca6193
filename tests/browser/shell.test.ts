import AxeBuilder from '@axe-core/playwright'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'

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

async function open(path: string, options: Parameters<TestBrowser['newPage']>[0] = {}): Promise<Page> {
  const page = await chromium.newPage({ baseURL: app.url, ...options })
  await page.goto(path)
  await page.getByRole('heading', { level: 1 }).waitFor()
  return page
}

async function signIn(page: Page, who: string, password = app.demoPassword): Promise<void> {
  await page.getByLabel('E-mail address').fill(`${who}@demo.vicinage.test`)
  await page.getByLabel('Password').fill(password)
  await page.getByLabel('Password').press('Enter')
}

async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page }).analyze()
  return found.map((violation) => `${violation.id}: ${violation.nodes[0]?.html ?? ''}`)
}

const focusedName = (page: Page): Promise<string | null> => page.evaluate(() => document.activeElement?.getAttribute('name') ?? null)

describe('signing in', () => {
  it('returns to where one was, shows the desk to those who may, and forgets on signing out', async () => {
    const page = await open('/sign-in?from=%2Faccount')
    expect(await page.getByRole('link', { name: 'Review', exact: true }).count()).toBe(0)
    await signIn(page, 'approver')
    await page.waitForURL(`${app.url}/account`)
    await page.getByRole('link', { name: 'Review', exact: true }).waitFor()
    await page.getByRole('button', { name: /^Account of/ }).click()
    await page.getByRole('menuitem', { name: 'Sign out' }).click()
    await page.getByText('Signed out. The newest release is shown.').first().waitFor()
    expect(await page.getByRole('link', { name: 'Review', exact: true }).count()).toBe(0)
  })

  it('never leads to another site', async () => {
    const page = await open('/sign-in?from=%2F%2Fevil.test%2F')
    await signIn(page, 'curator')
    await page.waitForURL(`${app.url}/`)
  })

  it('says in words what is wrong, keeps the address and puts the focus where it is to be mended', async () => {
    const page = await open('/sign-in')
    await page.getByRole('button', { name: 'Sign in', exact: true }).click()
    await page.getByText('Type the password.').waitFor()
    const before = chromium.complaints.length
    await signIn(page, 'curator', 'not the password')
    await page.getByRole('alert').waitFor()
    // The browser itself reports the refused request on its console.
    chromium.complaints.splice(before)
    expect(await page.getByLabel('E-mail address').inputValue()).toBe('curator@demo.vicinage.test')
    expect(await focusedName(page)).toBe('password')
  })

  it('fills in a demonstration account by one press, without its password', async () => {
    const page = await open('/sign-in')
    await page.getByRole('button', { name: 'Fill in the address of the steward' }).click()
    expect(await page.getByLabel('E-mail address').inputValue()).toBe('steward@demo.vicinage.test')
    expect(await page.getByLabel('Password').inputValue()).toBe('')
    expect(await focusedName(page)).toBe('password')
    expect(await page.content()).not.toContain(app.demoPassword)
  })

  it('asks again in place when the session has ended, and keeps what was typed behind', async () => {
    const page = await open('/sign-in?from=%2Fsubmissions%2Fnew')
    await signIn(page, 'curator')
    await page.waitForURL(`${app.url}/submissions/new`)
    const title = page.getByLabel('Title')
    await title.fill('Typed before the session ended')
    const before = chromium.complaints.length
    await page.context().clearCookies()
    await page.getByRole('button', { name: /^(Begin|Create|Make|Start)/ }).click()
    const dialog = page.getByRole('alertdialog', { name: 'Sign in again' })
    await dialog.getByLabel('Password').fill(app.demoPassword)
    await dialog.getByRole('button', { name: 'Sign in', exact: true }).click()
    await dialog.waitFor({ state: 'detached' })
    chromium.complaints.splice(before)
    expect(await title.inputValue()).toBe('Typed before the session ended')
  })
})

describe('by keyboard', () => {
  it('finds a galaxy by any of its names and opens it', async () => {
    const { rows } = (await (await fetch(`${app.url}/api/galaxies?limit=1&sort=name`)).json()) as { rows: { slug: string; name: string }[] }
    const galaxy = rows[0]
    if (!galaxy) throw new Error('the demonstration has no galaxy')
    const page = await open('/account')
    await page.keyboard.press('Control+k')
    await page.getByRole('dialog').waitFor()
    await page.keyboard.type(galaxy.name.toLowerCase())
    await page.getByRole('menuitem').first().waitFor()
    await page.getByRole('menuitem', { name: galaxy.name }).first().waitFor()
    await page.keyboard.press('Enter')
    await page.waitForURL(`${app.url}/galaxies/${galaxy.slug}`)
  })

  it('shows the keys by ?, which means itself in a field and nothing once single keys are off', async () => {
    const page = await open('/sign-in')
    await page.getByLabel('E-mail address').press('?')
    expect(await page.getByRole('dialog').count()).toBe(0)
    await page.getByRole('heading', { level: 1 }).click()
    await page.keyboard.press('?')
    await page.getByRole('dialog', { name: 'Keys on this page' }).waitFor()
    await page.getByText('Single-letter keys').click()
    await page.keyboard.press('Escape')
    await page.getByRole('dialog').waitFor({ state: 'detached' })
    await page.keyboard.press('?')
    await page.keyboard.press('Control+k')
    await page.getByRole('dialog', { name: 'Find a galaxy, a page or an action' }).waitFor()
  })

  it('goes straight to the content', async () => {
    const page = await open('/account')
    await page.keyboard.press('Tab')
    await page.keyboard.press('Enter')
    expect(new URL(page.url()).hash).toBe('#content')
  })
})

describe('on every screen', () => {
  const sizes = [
    { width: 1440, height: 900 },
    { width: 390, height: 844 },
  ]
  it.each(['light', 'dark'] as const)('is accessible and fits its window, %s', async (colorScheme) => {
    for (const viewport of sizes) {
      const page = await open('/', { viewport, colorScheme })
      for (const path of ['/', '/sign-in', '/account', '/nothing/here']) {
        await page.goto(path)
        await page.getByRole('heading', { level: 1 }).waitFor()
        await page.waitForLoadState('networkidle')
        expect(await violations(page), `${path} at ${viewport.width}`).toEqual([])
        expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth), `${path} at ${viewport.width}`).toBeLessThanOrEqual(0)
        expect(await page.getByText('Demonstration data, invented').filter({ visible: true }).count()).toBeGreaterThan(0)
      }
      await page.context().close()
    }
  })

  it('keeps the chosen theme, from the first paint on', async () => {
    const page = await open('/account', { colorScheme: 'light' })
    await page.getByText('Night', { exact: true }).click()
    await page.reload({ waitUntil: 'commit' })
    await page.waitForFunction(() => document.documentElement.dataset.theme !== undefined)
    expect(await page.evaluate(() => document.documentElement.dataset.theme)).toBe('night')
  })
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
