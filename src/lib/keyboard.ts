import { localSetting } from './local-setting.ts'

/**
 * Keys are written as people say them: `a`, `?`, `Mod+k` (Ctrl, on a Mac Command), `Shift+Enter`, `Escape`.
 */
export interface KeyStroke {
  key: string
  mod: boolean
  shift: boolean
  alt: boolean
}

/** WCAG 2.1.4: whoever dictates or has a shaking hand can switch the single-letter keys off. */
export const singleKeysSetting = localSetting<'on' | 'off'>('single-keys', ['on', 'off'])

const APPLE = typeof navigator !== 'undefined' && /Mac|iPhone|iPad/.test(navigator.userAgent)

export function parseKeys(keys: string): KeyStroke {
  const parts = keys.split('+')
  const key = parts.pop() || '+'
  const held = new Set(parts.map((part) => part.toLowerCase()))
  return { key: key.length === 1 ? key.toLowerCase() : key, mod: held.has('mod'), shift: held.has('shift'), alt: held.has('alt') }
}

/** Whether the keys are one bare character, which single-letter switching and fields concern. */
export function isSingleKey(keys: string): boolean {
  const stroke = parseKeys(keys)
  return stroke.key.length === 1 && !stroke.mod && !stroke.alt
}

export function matchesKeys(event: KeyboardEvent, keys: string): boolean {
  const stroke = parseKeys(keys)
  const mod = APPLE ? event.metaKey : event.ctrlKey
  const otherMod = APPLE ? event.ctrlKey : event.metaKey
  if (mod !== stroke.mod || otherMod || event.altKey !== stroke.alt) return false
  // A sign such as ? needs Shift on most keyboards: only letters and named keys are strict about it.
  const strictShift = stroke.key.length > 1 || /[a-z]/.test(stroke.key)
  if (strictShift && event.shiftKey !== stroke.shift) return false
  const pressed = event.key.length === 1 ? event.key.toLowerCase() : event.key
  return pressed === stroke.key
}

/** Whether the event happens where the reader types, or picks by typing: there single keys mean themselves. */
export function isTyping(event: KeyboardEvent): boolean {
  if (event.isComposing) return true
  const target = event.target
  if (!(target instanceof HTMLElement)) return false
  if (target.isContentEditable) return true
  return target.closest('input:not([type=checkbox]):not([type=radio]), textarea, select, [role=listbox], [role=menu], [role=combobox]') !== null
}

/** As printed on the keys: `Mod+k` is "Ctrl K", on a Mac "⌘ K". */
export function showKeys(keys: string): string {
  const stroke = parseKeys(keys)
  const names: Record<string, string> = { Escape: 'Esc', ArrowUp: '↑', ArrowDown: '↓', ArrowLeft: '←', ArrowRight: '→' }
  const parts = [
    stroke.mod && (APPLE ? '⌘' : 'Ctrl'),
    stroke.alt && (APPLE ? '⌥' : 'Alt'),
    stroke.shift && 'Shift',
    names[stroke.key] ?? (stroke.mod && stroke.key.length === 1 ? stroke.key.toUpperCase() : stroke.key),
  ]
  return parts.filter(Boolean).join(' ')
}
