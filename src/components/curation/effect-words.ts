/** How the values of an effect are written. */
import { columnOf } from '../../../core/columns.ts'
import { METHODS } from '../../../core/methods.ts'
import type { Effect } from '../../../core/schema/submissions.ts'
import { GAP } from '../../../core/spaces.ts'
import { formatCounted, formatNumber, formatSigned, unitText } from '../../lib/format.ts'

export type MovedGalaxy = Effect['galaxies'][number]
export type Moved = MovedGalaxy['changes'][number]

/** What a reader looks at first; the rest follows from it and is shown on demand. */
const FIRST = new Set(['name', 'class', 'status', 'dm', 'distance', 'distance_method', 'v_hel', 'v_mag', 'abs_v', 'host', 'host_relation', 'host_probability', 'host_sep'])

export const isFirst = (change: Moved): boolean => FIRST.has(change.column)

/** Slugs of galaxies in words, where the effect names them. */
export function namesIn(effect: Effect): ReadonlyMap<string, string> {
  return new Map([...effect.galaxies, ...effect.systems].map((g) => [g.slug, g.name]))
}

/** A value with its unit; slugs and keys as words. */
export function valueWords(column: string, value: Moved['before'], unit: string, names: ReadonlyMap<string, string>): string {
  if (typeof value !== 'number') {
    const text = String(value)
    if (column === 'distance_method') return METHODS.find((m) => m.key === text)?.label ?? text
    if (column === 'host' || column === 'main_disturber') return names.get(text) ?? text
    return text.replaceAll('-', ' ')
  }
  const text = formatNumber(value, columnOf(column)?.decimals ?? 2)
  return unit ? `${text}${GAP}${unitText(unit)}` : text
}

export function shiftWords({ column, before, after }: Moved): string {
  return typeof before === 'number' && typeof after === 'number' ? formatSigned(after - before, columnOf(column)?.decimals ?? 2) : ''
}

/** Of a galaxy that enters the catalogue: its distance, brightness and place, in a line. */
export function arrivalWords(galaxy: MovedGalaxy, names: ReadonlyMap<string, string>): string {
  const value = (column: string): string | null => {
    const change = galaxy.changes.find((c) => c.column === column)
    return change && change.after !== null ? valueWords(column, change.after, change.unit, names) : null
  }
  const host = value('host')
  const distance = value('distance')
  const brightness = value('abs_v')
  return [value('class'), distance ?? 'no distance', brightness && `M\u1d65 ${brightness}`, host ? `satellite of ${host}` : value('host_relation')].filter(Boolean).join(' · ')
}

export function effectSentence(counts: Effect['counts']): string {
  const parts = [
    counts.measurements > 0 && formatCounted(counts.measurements, 'measurement'),
    counts.galaxiesAdded > 0 && `${formatCounted(counts.galaxiesAdded, 'galaxy', 'galaxies')} added`,
    counts.galaxiesChanged > 0 && `${formatCounted(counts.galaxiesChanged, 'galaxy', 'galaxies')} changed`,
    counts.hostsChanged > 0 && `${formatCounted(counts.hostsChanged, 'galaxy', 'galaxies')} with another host`,
  ].filter((p): p is string => p !== false)
  return parts.length === 0 ? 'Nothing would change.' : `${parts.join(', ')}.`
}
