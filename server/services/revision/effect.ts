import { bounded, effectOfRows, type CatalogueEffect } from '../../../core/effect.ts'
import type { Neighbour } from '../../../core/derive/neighbourhood.ts'
import type { RevisionPlan } from './plan.ts'

/** The effect of a plan, as an approver reads it: the largest differences of it, and the counts of all. */
export function effectOf({ rows, before }: RevisionPlan): CatalogueEffect {
  const newName = new Map(rows.map((r) => [String(r.after.slug), String(r.after.name)]))
  // Asked for only where a system gains or loses members.
  let bySlug: Map<string, Neighbour> | null = null
  const known = (slug: string): Neighbour | undefined => {
    bySlug ??= new Map(before.neighbourhood.galaxies.map((g) => [g.slug, g]))
    return bySlug.get(slug)
  }
  const membersBefore = (slug: string): number => {
    const host = known(slug)
    return host ? (before.satellites.get(host.id) ?? 0) : 0
  }
  return bounded(effectOfRows(rows, membersBefore, (slug) => newName.get(slug) ?? known(slug)?.name ?? slug))
}
