/** Systems: hosts and their members. */
import { useQuery } from '@tanstack/react-query'
import { hostSchema, hostsSchema } from '../../core/schema/catalogue.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

export function useHosts(at: string | null = null) {
  return useQuery({
    queryKey: keys.hosts.list({ at }),
    queryFn: ({ signal }) => getJson('/api/hosts', hostsSchema, { query: { at }, signal }),
  })
}

export function useHost(slug: string, at: string | null = null) {
  return useQuery({
    queryKey: keys.hosts.one(slug, { at }),
    queryFn: ({ signal }) => getJson(`/api/hosts/${encodeURIComponent(slug)}`, hostSchema, { query: { at }, signal }),
  })
}
