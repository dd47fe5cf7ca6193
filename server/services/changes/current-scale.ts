/** The scale as it holds now, with the versions that changes are made from. */
import type { Knex } from 'knex'
import type { Anchor } from '../../../core/catalogue/types.ts'
import type { OverrideChoice } from '../../../core/schema/changes.ts'
import { policySchema } from '../../../core/scale/policy.ts'
import type { Policy } from '../../../core/scale/policy.ts'

export type HeldAnchor = Anchor & { versionId: number; revFrom: number }

export interface HeldPolicy {
  versionId: number
  revFrom: number
  document: Policy
}

export interface HeldOverride {
  versionId: number
  revFrom: number
  galaxy: number
  about: string
  choice: OverrideChoice
  reason: string
}

/** All adopted anchors, by key, in the order of their labels. */
export async function anchorsNow(knex: Knex): Promise<Map<string, HeldAnchor>> {
  const rows = (await knex('anchors').select('id as versionId', 'revFrom', 'key', 'label', 'kind', 'methods', 'value', 'err', 'source').whereNull('revTo').orderBy(['label', 'key'])) as HeldAnchor[]
  return new Map(rows.map((a) => [a.key, a]))
}

/** The policy in force; undefined in a catalogue whose scale was never laid. */
export async function policyNow(knex: Knex): Promise<HeldPolicy | undefined> {
  const row = (await knex('policies').select('id as versionId', 'revFrom', 'document').whereNull('revTo').first()) as { versionId: number; revFrom: number; document: unknown } | undefined
  return row && { ...row, document: policySchema.parse(row.document) }
}

/** Overrides in force of these galaxies, by {@link overrideKey}. */
export async function overridesNow(knex: Knex, galaxies: Iterable<number>): Promise<Map<string, HeldOverride>> {
  const wanted = [...new Set(galaxies)]
  if (wanted.length === 0) return new Map()
  const rows = (await knex('overrides')
    .select('id as versionId', 'revFrom', 'galaxy', 'about', 'choice', 'reason')
    .whereRaw('galaxy = ANY(?)', [wanted])
    .whereNull('revTo')) as HeldOverride[]
  return new Map(rows.map((o) => [overrideKey(o.galaxy, o.about), o]))
}

export function overrideKey(galaxy: number | null, about: string): string {
  return `${galaxy} ${about}`
}
