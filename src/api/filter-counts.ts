import { useQueries } from '@tanstack/react-query'
import { galaxyListSchema } from '../../core/schema/catalogue.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

/** How many galaxies each of these filters lets through; undefined while that is not known. @param filters - canonical query strings; none asks nothing */
export function useFilterCounts(filters: readonly string[]): (number | undefined)[] {
  return useQueries({
    queries: filters.map((filter) => ({
      queryKey: keys.galaxies.about('count', filter),
      queryFn: ({ signal }: { signal: AbortSignal }) => {
        const query = new URLSearchParams(filter)
        query.set('limit', '1')
        query.set('columns', 'slug')
        return getJson('/api/galaxies', galaxyListSchema, { query, signal })
      },
    })),
    combine: (results) => results.map((result) => result.data?.total),
  })
}
