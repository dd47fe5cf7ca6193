import type { Facets } from '../../../core/schema/catalogue.ts'

/** Names of hosts by slug, as the facets tell them. */
export function hostNames(facets: Facets | undefined): Record<string, string> {
  return Object.fromEntries((facets?.choices.host ?? []).flatMap(({ value, label }) => (value === null ? [] : [[value, label]])))
}
