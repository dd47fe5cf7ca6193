/** The literature. */
import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { sourceDetailSchema, sourceListSchema, sourceSchema, type SourceForm } from '../../core/schema/sources.ts'
import { getJson, sendJson } from './client.ts'
import { keys } from './keys.ts'

/** Sources whose label, title, authors, bibcode or DOI match; all for an empty search. */
export function useSources(q: string, enabled = true) {
  return useQuery({
    queryKey: keys.sources.list({ q }),
    queryFn: ({ signal }) => getJson('/api/sources', sourceListSchema, { query: { q }, signal }),
    placeholderData: keepPreviousData,
    enabled,
  })
}

export function useSource(id: number | string) {
  return useQuery({ queryKey: keys.sources.one(id), queryFn: ({ signal }) => getJson(`/api/sources/${id}`, sourceDetailSchema, { signal }) })
}

export function useCreateSource() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (body: SourceForm) => sendJson('POST', '/api/sources', body, sourceSchema),
    onSuccess: () => client.invalidateQueries({ queryKey: keys.sources.all }),
  })
}
