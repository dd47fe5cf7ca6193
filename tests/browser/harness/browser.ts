import type { Browser, BrowserContext, BrowserContextOptions, Page } from 'playwright-core'
import { chromium } from 'playwright-core'
import { CHROMIUM_FLAGS, findChromium } from '../../../scripts/chromium.mjs'

/** A Chromium, and what its pages complained about. */
export interface TestBrowser {
  readonly browser: Browser
  /** A page in a fresh context (its own cookies); 1280 x 800 unless told otherwise. */
  newPage(options?: BrowserContextOptions): Promise<Page>
  /** Uncaught errors, console errors and refused (CSP) loads of every page so far. A test expects none. */
  readonly complaints: string[]
  close(): Promise<void>
}

/** Starts the machine's Chromium. Call `close` in afterAll. */
export async function openBrowser(): Promise<TestBrowser> {
  const executablePath = findChromium()
  if (!executablePath) throw new Error('No Chromium was found; "npm test" installs it as root, CHROMIUM=/path/to/it names another.')
  const browser = await chromium.launch({ executablePath, args: CHROMIUM_FLAGS })
  const complaints: string[] = []
  return {
    browser,
    complaints,
    newPage: async (options = {}) => {
      const context = await browser.newContext({
        viewport: { width: 1280, height: 800 },
        locale: 'en-GB',
        timezoneId: 'UTC',
        acceptDownloads: true,
        ...options,
      })
      context.setDefaultTimeout(15_000)
      listenForComplaints(context, complaints)
      return context.newPage()
    },
    close: () => browser.close(),
  }
}

function listenForComplaints(context: BrowserContext, complaints: string[]): void {
  context.on('weberror', (error) => complaints.push(`uncaught: ${error.error().message}`))
  context.on('console', (message) => {
    if (message.type() === 'error') complaints.push(`console: ${message.text()} (${message.location().url})`)
  })
}
