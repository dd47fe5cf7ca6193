import { useQuery } from '@tanstack/react-query'
import { summarySchema } from '../../core/schema/catalogue.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

/** The catalogue at a glance. */
export function useSummary() {
  return useQuery({ queryKey: keys.summary, queryFn: ({ signal }) => getJson('/api/summary', summarySchema, { signal }) })
}
