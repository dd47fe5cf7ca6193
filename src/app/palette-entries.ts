import type { Resolved } from '../../core/schema/catalogue.ts'
import { classLabel } from '../../core/classes.ts'
import { paths } from '../paths.ts'
import type { Action } from './actions/registry.ts'
import type { PageEntry } from './pages.ts'

export interface PaletteEntry {
  id: string
  label: string
  hint?: string
  keys?: string
  galaxyClass?: Resolved['matches'][number]['class']
  go: { to: string } | { perform: () => void }
}

export interface PaletteGroup {
  title: string
  entries: PaletteEntry[]
}

const plain = (text: string): string => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()

/** Whether every word typed begins some word of the text, or stands in it. */
export function fits(text: string, typed: string): boolean {
  const haystack = plain(text)
  return plain(typed)
    .split(/\s+/)
    .every((word) => haystack.includes(word))
}

/** What the palette shows: galaxies as the server found them, then pages and actions that fit. */
export function paletteGroups(typed: string, matches: Resolved['matches'], pages: readonly PageEntry[], actions: readonly Action[]): PaletteGroup[] {
  const galaxies: PaletteEntry[] = matches.map((match) => ({
    id: `galaxy:${match.slug}`,
    label: match.name,
    hint: match.matched !== match.name ? `${classLabel(match.class)}, also ${match.matched}` : classLabel(match.class),
    galaxyClass: match.class,
    go: { to: paths.galaxy(match.slug) },
  }))
  const pageEntries: PaletteEntry[] = pages
    .filter((page) => fits(`${page.label} ${page.hint}`, typed))
    .map((page) => ({ id: `page:${page.path}`, label: page.label, hint: page.hint, go: { to: page.path } }))
  const actionEntries: PaletteEntry[] = actions
    .filter((action) => !action.keysOnly && action.name !== 'app.find' && fits(`${action.label} ${action.group ?? ''} ${action.also ?? ''}`, typed))
    .map((action) => ({ id: `action:${action.name}`, label: action.label, keys: action.keys, go: { perform: action.perform } }))
  return [
    { title: 'Galaxies', entries: galaxies },
    { title: 'Pages', entries: pageEntries },
    { title: 'Actions', entries: actionEntries },
  ].filter((group) => group.entries.length > 0)
}
