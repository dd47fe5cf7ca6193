import { useMemo } from 'react'
import { galaxiesFromPoints, type FigureGalaxy } from '../../../core/figure/galaxy.ts'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import { usePoints } from '../../api/galaxies.ts'
import { useSession } from '../../api/session.ts'
import { useSummary } from '../../api/summary.ts'

export interface MapData {
  galaxies: readonly FigureGalaxy[]
  revision: number | null
  /** "2026.2", or "revision 12": as the credit line of a figure names it. */
  releaseLabel: string
  isPending: boolean
  isError: boolean
  error: unknown
  refetch: () => void
}

const NONE: readonly FigureGalaxy[] = []

/** The galaxies that a filter lets through, ready to be drawn. @param query - canonical query string, `at` in it */
export function useMapData(query: string, enabled = true): MapData {
  const points = usePoints(query, enabled)
  const { catalogue } = useSession()
  const newest = useSummary().data?.release
  const galaxies = useMemo(() => (points.data ? galaxiesFromPoints(points.data) : NONE), [points.data])
  const revision = points.data?.revision ?? null
  const at = new URLSearchParams(query).get('at')
  const named = at !== null && !/^\d+$/.test(at) ? at : newest?.revision === revision ? (newest?.label ?? catalogue?.release) : null
  return {
    galaxies,
    revision,
    releaseLabel: named ?? (revision === null ? '' : `revision ${revision}`),
    isPending: points.isPending,
    isError: points.isError,
    error: points.error,
    refetch: () => void points.refetch(),
  }
}

/** The query string of a recipe: its filter at its revision. */
export function queryOfRecipe({ filter, at }: Pick<FigureRecipe, 'filter' | 'at'>): string {
  const query = new URLSearchParams(filter)
  if (at !== undefined) query.set('at', at)
  return query.toString()
}
