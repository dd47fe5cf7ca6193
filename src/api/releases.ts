/** Releases. */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { releaseListSchema, releaseSchema, type ReleaseInput } from '../../core/schema/releases.ts'
import { getJson, sendJson } from './client.ts'
import { keys } from './keys.ts'

export function useReleases() {
  return useQuery({ queryKey: keys.releases.list(), queryFn: ({ signal }) => getJson('/api/releases', releaseListSchema, { signal }) })
}

export function useRelease(label: string) {
  return useQuery({ queryKey: keys.releases.one(label), queryFn: ({ signal }) => getJson(`/api/releases/${encodeURIComponent(label)}`, releaseSchema, { signal }) })
}

/** Publishing: from now on visitors read this revision. */
export function usePublish() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (body: ReleaseInput) => sendJson('POST', '/api/releases', body, releaseSchema),
    onSuccess: () => client.invalidateQueries(),
  })
}
