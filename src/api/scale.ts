/** The scale: anchors, methods and adoption policy, and how they came to be. */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import type { ChangeForm } from '../../core/schema/changes.ts'
import { scaleHistorySchema, scaleSchema } from '../../core/schema/scale.ts'
import { submissionSchema } from '../../core/schema/submissions.ts'
import { getJson, sendJson } from './client.ts'
import { keys } from './keys.ts'

export function useScale(at: string | null = null) {
  return useQuery({ queryKey: keys.scale.list({ at }), queryFn: ({ signal }) => getJson('/api/scale', scaleSchema, { query: { at }, signal }) })
}

export function useScaleHistory(at: string | null = null) {
  return useQuery({ queryKey: keys.scale.about('history', { at }), queryFn: ({ signal }) => getJson('/api/scale/history', scaleHistorySchema, { query: { at }, signal }) })
}

export interface ScaleProposal {
  /** An own draft that is added to; null begins one. */
  draft: number | null
  title: string
  changes: readonly ChangeForm[]
}

/**
 * Puts changes of the scale into a draft: each once, so that sending them again after a failure, or on top of earlier ones of the same anchor,
 * rewrites what is there.
 *
 * @param onDraft - told the draft as soon as there is one, so that a second try uses it
 */
export function useProposeScale(onDraft: (draft: number) => void) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: async ({ draft, title, changes }: ScaleProposal) => {
      let submission =
        draft === null ? await sendJson('POST', '/api/submissions', { title }, submissionSchema) : await getJson(`/api/submissions/${draft}`, submissionSchema)
      onDraft(submission.id)
      for (const body of changes) {
        const there = submission.items.find((item) => item.action === body.action && sameThing(item.payload, body.payload))
        const path = `/api/submissions/${submission.id}/changes${there ? `/${there.id}` : ''}`
        submission = await sendJson(there ? 'PATCH' : 'POST', path, body, submissionSchema)
      }
      return submission
    },
    onSuccess: (submission) => client.setQueryData(keys.submissions.one(String(submission.id)), submission),
    onSettled: () => client.invalidateQueries({ queryKey: ['submissions', 'list'] }),
  })
}

/** Two changes of one anchor, or of the policy, which has no key. */
function sameThing(a: unknown, b: unknown): boolean {
  const keyOf = (payload: unknown): unknown => (typeof payload === 'object' && payload !== null && 'key' in payload ? payload.key : null)
  return keyOf(a) === keyOf(b)
}
