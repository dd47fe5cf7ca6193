/** The catalogue: lists under a filter, facets, points for maps, one galaxy and what belongs to it. */
import { keepPreviousData, useInfiniteQuery, useQuery } from '@tanstack/react-query'
import { facetsSchema, galaxyListSchema, galaxySchema, historySchema, measurementsSchema, neighboursSchema, pointsSchema } from '../../core/schema/catalogue.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

/** Rows under a filter, page by page. @param filter - canonical query string of core/filters, without `cursor` */
export function useGalaxies(filter: string, pageSize = 100, enabled = true) {
  return useInfiniteQuery({
    enabled,
    queryKey: keys.galaxies.list({ filter, pageSize }),
    initialPageParam: null as string | null,
    queryFn: ({ pageParam, signal }) => {
      const query = new URLSearchParams(filter)
      query.set('limit', String(pageSize))
      if (pageParam !== null) query.set('cursor', pageParam)
      return getJson('/api/galaxies', galaxyListSchema, { query, signal })
    },
    getNextPageParam: (page) => page.next,
    placeholderData: keepPreviousData,
  })
}

/** Counts and histograms under the same filter. */
export function useFacets(filter: string, enabled = true) {
  return useQuery({
    enabled,
    queryKey: keys.galaxies.about('facets', filter),
    queryFn: ({ signal }) => getJson('/api/galaxies/facets', facetsSchema, { query: new URLSearchParams(filter), signal }),
    placeholderData: keepPreviousData,
  })
}

/** All matching galaxies, column-wise, for maps. */
export function usePoints(filter: string, enabled = true) {
  return useQuery({
    enabled,
    queryKey: keys.galaxies.about('points', filter),
    queryFn: ({ signal }) => getJson('/api/galaxies/points', pointsSchema, { query: new URLSearchParams(filter), signal }),
    placeholderData: keepPreviousData,
    staleTime: 60_000,
  })
}

const address = (slug: string, part = ''): string => `/api/galaxies/${encodeURIComponent(slug)}${part}`

/** @param at - revision or release label; null for the newest that the reader may see */
export function useGalaxy(slug: string, at: string | null = null) {
  return useQuery({
    queryKey: keys.galaxies.one(slug, { at }),
    queryFn: ({ signal }) => getJson(address(slug), galaxySchema, { query: { at }, signal }),
    // Before a galaxy is chosen there is nothing to ask for.
    enabled: slug !== '',
  })
}

export function useMeasurements(slug: string, at: string | null = null) {
  return useQuery({
    queryKey: keys.galaxies.part(slug, 'measurements', { at }),
    queryFn: ({ signal }) => getJson(address(slug, '/measurements'), measurementsSchema, { query: { at }, signal }),
    enabled: slug !== '',
  })
}

export function useHistory(slug: string) {
  return useQuery({
    queryKey: keys.galaxies.part(slug, 'history'),
    queryFn: ({ signal }) => getJson(address(slug, '/history'), historySchema, { signal }),
  })
}

export function useNeighbours(slug: string, at: string | null = null) {
  return useQuery({
    queryKey: keys.galaxies.part(slug, 'neighbours', { at }),
    queryFn: ({ signal }) => getJson(address(slug, '/neighbours'), neighboursSchema, { query: { at }, signal }),
  })
}
