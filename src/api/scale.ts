/** The scale: anchors and adoption policy. */
import { useQuery } from '@tanstack/react-query'
import { scaleSchema } from '../../core/schema/catalogue.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

export function useScale(at: string | null = null) {
  return useQuery({ queryKey: keys.scale.list({ at }), queryFn: ({ signal }) => getJson('/api/scale', scaleSchema, { query: { at }, signal }) })
}
