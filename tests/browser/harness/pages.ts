import AxeBuilder from '@axe-core/playwright'
import type { BrowserContextOptions, Page } from 'playwright-core'
import type { RunningApp } from './app.ts'
import type { TestBrowser } from './browser.ts'

/** A page of the application in a fresh context, its heading there and its requests answered. */
export async function openPage(app: RunningApp, browser: TestBrowser, path: string, options: BrowserContextOptions = {}): Promise<Page> {
  const page = await browser.newPage({ baseURL: app.url, ...options })
  await goTo(page, path)
  return page
}

/** Goes on to another address of the application. */
export async function goTo(page: Page, path: string): Promise<void> {
  await page.goto(path)
  await page.getByRole('heading', { level: 1 }).waitFor()
  await page.waitForLoadState('networkidle')
}

/** Signs a demonstration account in: `curator`, `outreach` ... The page then shows the first page. */
export async function signInAs(app: RunningApp, page: Page, who: string): Promise<void> {
  await goTo(page, '/sign-in')
  await page.getByLabel('E-mail address').fill(`${who}@demo.vicinage.test`)
  await page.getByLabel('Password').fill(app.demoPassword)
  await page.getByLabel('Password').press('Enter')
  await page.getByRole('button', { name: /^Account of/ }).waitFor()
}

/** What axe finds wrong with the page as it stands. */
export async function violationsOf(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze()
  return violations.map((violation) => `${violation.id}: ${violation.nodes[0]?.html ?? ''}`)
}

/** By how many px the page is wider than its window. */
export function overflowOf(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
}

/** Colours do not depend on the width, nor the fit on the colours: two looks see what four would. */
const LOOKS = [
  { colorScheme: 'light', viewport: { width: 1440, height: 900 } },
  { colorScheme: 'dark', viewport: { width: 390, height: 844 } },
] as const

/** Looks at pages wide in Paper and narrow in Night. @returns what is wrong with them: nothing, one hopes */
export async function inspectPages(app: RunningApp, browser: TestBrowser, paths: readonly string[]): Promise<string[]> {
  const wrong: string[] = []
  for (const { colorScheme, viewport } of LOOKS) {
    const page = await browser.newPage({ baseURL: app.url, viewport, colorScheme })
    for (const path of paths) {
      await goTo(page, path)
      const found = await violationsOf(page)
      const overflow = await overflowOf(page)
      wrong.push(...found.map((text) => `${path} at ${viewport.width}, ${colorScheme}: ${text}`))
      if (overflow > 0) wrong.push(`${path} at ${viewport.width}, ${colorScheme}: wider than its window by ${overflow} px`)
    }
    await page.context().close()
  }
  return wrong
}
