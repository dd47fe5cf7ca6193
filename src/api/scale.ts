/** The scale: anchors, methods and adoption policy, and how they came to be. */
import { useQuery } from '@tanstack/react-query'
import { scaleHistorySchema, scaleSchema } from '../../core/schema/scale.ts'
import { getJson } from './client.ts'
import { keys } from './keys.ts'

export function useScale(at: string | null = null) {
  return useQuery({ queryKey: keys.scale.list({ at }), queryFn: ({ signal }) => getJson('/api/scale', scaleSchema, { query: { at }, signal }) })
}

export function useScaleHistory(at: string | null = null) {
  return useQuery({ queryKey: keys.scale.about('history', { at }), queryFn: ({ signal }) => getJson('/api/scale/history', scaleHistorySchema, { query: { at }, signal }) })
}
