/** What a change of the catalogue does: two states in, the list of differences that matter out. */
import { COLUMNS, columnOf, type CatalogueRow, type CatalogueValue } from './columns.ts'

export interface RowChange {
  galaxyId: number
  /** null for a galaxy that is new. */
  before: CatalogueRow | null
  after: CatalogueRow
}

export interface GalaxyEffect {
  slug: string
  name: string
  kind: 'added' | 'changed'
  changes: { column: string; label: string; unit: string; before: CatalogueValue; after: CatalogueValue }[]
}

export interface SystemEffect {
  slug: string
  name: string
  before: number
  after: number
  gained: string[]
  lost: string[]
}

/** A galaxy whose adopted distance modulus moves. */
export interface Shift {
  slug: string
  name: string
  /** Mpc, before. */
  distance: number
  /** mag */
  before: number
  after: number
  /** Of the modulus before, statistical and systematic, mag. */
  error: number
  method: string | null
  hostChanged: boolean
}

export interface CatalogueEffect {
  galaxies: GalaxyEffect[]
  systems: SystemEffect[]
  shifts: Shift[]
  counts: { galaxiesAdded: number; galaxiesChanged: number; distancesMoved: number; hostsChanged: number }
}

/** Follow from others that are listed, or say nothing about the galaxy. */
const UNTOLD: ReadonlySet<string> = new Set([
  'slug', 'revision', 'updated_at', 'glon', 'glat', 'sgl', 'sgb', 'distance_lo', 'distance_hi', 'n_sources', 'n_distance_all', 'host_sep_lo', 'host_sep_hi', 'host_dv_err', 'v_cmb', 'abs_b_err', 'abs_v_err', 'abs_k_err',
  'abs_i_err', 'abs_g_err', 'abs_r_err', 'r_half_pc_err', 'r_circ_pc_err', 'mu_half_err', 'diameter_kpc_err', 'log_mhi_err', 'log_mstar_err',
])
const DM_DECIMALS = columnOf('dm')?.decimals ?? 3
const TOLD = COLUMNS.filter((c) => !UNTOLD.has(c.key))

/**
 * The effect of a set of changed rows. A number counts as different when it would print differently, at the decimals of its column; rows
 * that print alike are left out. The effect of nothing is nothing.
 *
 * @param membersBefore - satellites of each host (by slug) before
 * @param nameOf - the name of a host by its slug
 */
export function effectOfRows(rows: readonly RowChange[], membersBefore: (slug: string) => number, nameOf: (slug: string) => string): CatalogueEffect {
  const galaxies = rows.flatMap((row): GalaxyEffect[] => {
    const changes = differences(row)
    if (changes.length === 0) return []
    return [{ slug: String(row.after.slug), name: String(row.after.name), kind: row.before === null ? 'added' : 'changed', changes }]
  })
  const systems = systemsOf(rows, membersBefore, nameOf)
  const shifts = rows.flatMap((row) => shiftOf(row) ?? [])
  return {
    galaxies: galaxies.sort(byWeight),
    systems,
    shifts: shifts.sort(byShift),
    counts: {
      galaxiesAdded: rows.filter((r) => r.before === null).length,
      galaxiesChanged: galaxies.filter((g) => g.kind === 'changed').length,
      distancesMoved: shifts.length,
      hostsChanged: rows.filter((r) => r.before !== null && r.before.host !== r.after.host).length,
    },
  }
}

/** The effect of nothing. */
export function nothing(): CatalogueEffect {
  return { galaxies: [], systems: [], shifts: [], counts: { galaxiesAdded: 0, galaxiesChanged: 0, distancesMoved: 0, hostsChanged: 0 } }
}

/** The largest effects are listed in part, so that they can be read at all; the counts are of all. */
export const EFFECT_MOST_GALAXIES = 1000
export const EFFECT_MOST_SHIFTS = 20_000

/** The effect with no more listed than can be read. */
export function bounded(effect: CatalogueEffect): CatalogueEffect {
  return { ...effect, galaxies: effect.galaxies.slice(0, EFFECT_MOST_GALAXIES), shifts: effect.shifts.slice(0, EFFECT_MOST_SHIFTS) }
}

/** The effects of sets of rows that have no galaxy in common, as one, bounded. */
export function mergeEffects(effects: readonly CatalogueEffect[]): CatalogueEffect {
  const systems = new Map<string, SystemEffect>()
  for (const system of effects.flatMap((e) => e.systems)) {
    const known = systems.get(system.slug)
    systems.set(system.slug, known ? { ...known, gained: [...known.gained, ...system.gained].sort(), lost: [...known.lost, ...system.lost].sort() } : system)
  }
  const sum = (key: keyof CatalogueEffect['counts']): number => effects.reduce((total, e) => total + e.counts[key], 0)
  return bounded({
    galaxies: effects.flatMap((e) => e.galaxies).sort(byWeight),
    systems: [...systems.values()].map((s) => ({ ...s, after: s.before + s.gained.length - s.lost.length })),
    shifts: effects.flatMap((e) => e.shifts).sort(byShift),
    counts: { galaxiesAdded: sum('galaxiesAdded'), galaxiesChanged: sum('galaxiesChanged'), distancesMoved: sum('distancesMoved'), hostsChanged: sum('hostsChanged') },
  })
}

function differences({ before, after }: RowChange): GalaxyEffect['changes'] {
  return TOLD.flatMap((column) => {
    const was = before?.[column.key] ?? null
    const is = after[column.key] ?? null
    if (printed(was, column.decimals) === printed(is, column.decimals)) return []
    return [{ column: column.key, label: column.label, unit: column.unit, before: was, after: is }]
  })
}

/** Null for a galaxy that has no distance before or after, or whose modulus prints as before. */
function shiftOf({ before, after }: RowChange): Shift | null {
  if (before === null || typeof before.dm !== 'number' || typeof after.dm !== 'number' || typeof before.distance !== 'number') return null
  if (printed(before.dm, DM_DECIMALS) === printed(after.dm, DM_DECIMALS)) return null
  const part = (key: string): number => (typeof before[key] === 'number' ? before[key] : 0)
  return {
    slug: String(after.slug), name: String(after.name), distance: before.distance, before: before.dm, after: after.dm, error: Math.hypot(part('dm_err'), part('dm_err_sys')),
    method: after.distance_method === null ? null : String(after.distance_method), hostChanged: before.host !== after.host,
  }
}

/** Farthest first, then by name. */
function byShift(a: Shift, b: Shift): number {
  return Math.abs(b.after - b.before) - Math.abs(a.after - a.before) || a.name.localeCompare(b.name, 'en')
}

function printed(value: CatalogueValue, decimals: number): string {
  if (typeof value !== 'number') return String(value)
  const text = value.toFixed(decimals)
  return Number(text) === 0 ? (0).toFixed(decimals) : text
}

function systemsOf(rows: readonly RowChange[], membersBefore: (slug: string) => number, nameOf: (slug: string) => string): SystemEffect[] {
  const systems = new Map<string, { gained: string[]; lost: string[] }>()
  const of = (slug: string): { gained: string[]; lost: string[] } => {
    const found = systems.get(slug) ?? { gained: [], lost: [] }
    systems.set(slug, found)
    return found
  }
  for (const { before, after } of rows) {
    const was = before?.host ?? null
    const is = after.host ?? null
    if (was === is) continue
    if (was !== null) of(String(was)).lost.push(String(after.name))
    if (is !== null) of(String(is)).gained.push(String(after.name))
  }
  return [...systems].map(([slug, { gained, lost }]) => {
    const before = membersBefore(slug)
    return { slug, name: nameOf(slug), before, after: before + gained.length - lost.length, gained: gained.sort(), lost: lost.sort() }
  })
}

/** New galaxies first, then those that change host, then those with most that changes, then by name. */
function byWeight(a: GalaxyEffect, b: GalaxyEffect): number {
  const movesHost = (g: GalaxyEffect): number => Number(g.changes.some((c) => c.column === 'host'))
  return Number(b.kind === 'added') - Number(a.kind === 'added') || movesHost(b) - movesHost(a) || b.changes.length - a.changes.length || a.name.localeCompare(b.name, 'en')
}
