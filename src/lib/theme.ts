import { localSetting } from './local-setting.ts'

/** What the reader chose; `system` follows the device. */
export type ThemeChoice = 'system' | 'paper' | 'night'

/** The same key and words as public/early.js, which applies the choice before the first paint. */
export const themeSetting = localSetting<ThemeChoice>('theme', ['system', 'paper', 'night'])

const PAPER_SURFACE = '#f6f2e9'
const NIGHT_SURFACE = '#0e1420'

function systemPrefersNight(): MediaQueryList {
  return window.matchMedia('(prefers-color-scheme: dark)')
}

/** Which of the two themes is on the screen now. */
export function shownTheme(): 'paper' | 'night' {
  const choice = themeSetting.get()
  if (choice !== 'system') return choice
  return systemPrefersNight().matches ? 'night' : 'paper'
}

function apply(): void {
  const theme = shownTheme()
  document.documentElement.dataset.theme = theme
  document.querySelector('meta[name="theme-color"]')?.setAttribute('content', theme === 'night' ? NIGHT_SURFACE : PAPER_SURFACE)
}

/** Keeps the page in the chosen theme; called once, at the start. */
export function followTheme(): void {
  apply()
  themeSetting.subscribe(apply)
  systemPrefersNight().addEventListener('change', apply)
}

/** Calls back whenever the shown theme changes: for canvases, which must be painted anew. Returns the way to stop. */
export function onThemeChange(listener: () => void): () => void {
  const observer = new MutationObserver(listener)
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] })
  return () => observer.disconnect()
}

/** The present value of a colour token, for canvases: `tokenColour('ink')`. */
export function tokenColour(token: string): string {
  return getComputedStyle(document.documentElement).getPropertyValue(`--${token}`).trim()
}
