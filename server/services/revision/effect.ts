import { effectOfRows, type CatalogueEffect } from '../../../core/effect.ts'
import type { RevisionPlan } from './plan.ts'

/** The effect of a plan, as an approver reads it. */
export function effectOf(plan: RevisionPlan): CatalogueEffect {
  const nameOf = new Map(plan.rows.map((r) => [String(r.after.slug), String(r.after.name)]))
  return effectOfRows(plan.rows, (slug) => plan.members.get(slug) ?? 0, (slug) => nameOf.get(slug) ?? plan.names.get(slug) ?? slug)
}
