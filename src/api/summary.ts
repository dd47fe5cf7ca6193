/** The catalogue at a glance. */
import { useQuery } from '@tanstack/react-query'
import { summarySchema } from '../../core/schema/catalogue.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

export function useSummary() {
  return useQuery({ queryKey: keys.revisions.about('summary'), queryFn: ({ signal }) => getJson('/api/summary', summarySchema, { signal }), refetchOnWindowFocus: true })
}
