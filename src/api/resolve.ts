import { useQuery } from '@tanstack/react-query'
import { resolveSchema } from '../../core/schema/catalogue.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

const LEAST_LETTERS = 2

/** Galaxies by any of their names, likeliest first; asks nothing below two letters. */
export function useResolve(name: string) {
  const wanted = name.trim()
  return useQuery({
    queryKey: keys.resolve(wanted),
    queryFn: ({ signal }) => getJson('/api/resolve', resolveSchema, { signal, query: { name: wanted } }),
    enabled: wanted.length >= LEAST_LETTERS,
    staleTime: 60_000,
    placeholderData: (previous) => previous,
    retry: false,
  })
}
