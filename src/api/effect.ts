/** What approving a submission would do, with word of how far the computation is. */
import { useState } from 'react'
import { useQuery } from '@tanstack/react-query'
import { effectLineSchema, type Effect } from '../../core/schema/submissions.ts'
import { ApiProblem, getLines } from './client.ts'
import { keys } from './keys.ts'
import { unreadable } from './problem.ts'

export interface EffectProgress {
  /** 0 to 1 */
  progress: number
  /** What is being done, in words. */
  step: string
}

/**
 * Reads the effect as it is computed.
 *
 * @throws ApiProblem for every failure but a cancelled request (AbortError)
 */
export async function readEffect(id: number | string, onProgress: (progress: EffectProgress) => void, signal?: AbortSignal): Promise<Effect> {
  const path = `/api/submissions/${id}/effect/progress`
  for await (const line of getLines(path, effectLineSchema, { signal })) {
    if ('effect' in line) return line.effect
    if ('problem' in line) throw new ApiProblem(line.problem)
    onProgress(line)
  }
  throw unreadable(path, 'it ended before the effect came')
}

export interface EffectQuery {
  data: Effect | undefined
  error: Error | null
  isError: boolean
  /** null before the first word of it. */
  progress: EffectProgress | null
  refetch: () => Promise<unknown>
}

/** What approval would do, whole catalogue. @param stamp - changes when the submission does, so that the effect is computed anew */
export function useEffectOf(id: number | string, stamp: string | number, enabled = true): EffectQuery {
  const [progress, setProgress] = useState<EffectProgress | null>(null)
  const { data, error, isError, refetch } = useQuery({
    queryKey: keys.submissions.part(id, 'effect', stamp),
    queryFn: ({ signal }) => {
      setProgress(null)
      return readEffect(id, setProgress, signal)
    },
    enabled,
  })
  return { data, error, isError, progress, refetch }
}
