import { useQuery } from '@tanstack/react-query'
import { z } from 'zod'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

/** What `GET /api/resolve?name=` answers: the galaxies that may be meant, likeliest first. */
export const resolveSchema = z.object({
  matches: z.array(z.object({ slug: z.string(), name: z.string(), matched: z.string(), class: z.string() })),
})

export type Match = z.infer<typeof resolveSchema>['matches'][number]

/** Galaxies by any of their names; asks nothing below two letters. */
export function useResolve(name: string) {
  const wanted = name.trim()
  return useQuery({
    queryKey: keys.resolve(wanted),
    queryFn: ({ signal }) => getJson('/api/resolve', resolveSchema, { signal, query: { name: wanted } }),
    enabled: wanted.length >= 2,
    staleTime: 60_000,
    placeholderData: (previous) => previous,
    retry: false,
  })
}
