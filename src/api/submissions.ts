/** Submissions: drafts, their changes, the effect, and every move from one state to the next. */
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import type { ChangeForm } from '../../core/schema/changes.ts'
import { submissionListSchema, submissionSchema, type SubmissionAnswer } from '../../core/schema/submissions.ts'
import { getJson, sendJson } from './client.ts'
import { keys } from './keys.ts'

export interface SubmissionQuery {
  state?: string
  mine?: boolean
  /** Those that wait for the reader's review. */
  review?: boolean
}

const address = (id: number | string, part = ''): string => `/api/submissions/${id}${part}`

export function useSubmissions(query: SubmissionQuery) {
  return useQuery({
    queryKey: keys.submissions.list({ ...query }),
    queryFn: ({ signal }) => getJson('/api/submissions', submissionListSchema, { query: { ...query }, signal }),
    refetchOnWindowFocus: true,
  })
}

export function useSubmission(id: number | string) {
  return useQuery({
    queryKey: keys.submissions.one(id),
    queryFn: ({ signal }) => getJson(address(id), submissionSchema, { signal }),
    refetchOnWindowFocus: true,
  })
}

/** Keeps the answer of a write as what the pages show, and lets lists be read again. */
function useKeep() {
  const client = useQueryClient()
  return (submission: SubmissionAnswer): void => {
    client.setQueryData(keys.submissions.one(submission.id), submission)
    client.setQueryData(keys.submissions.one(String(submission.id)), submission)
    void client.invalidateQueries({ queryKey: ['submissions', 'list'] })
  }
}

export function useCreateSubmission() {
  const keep = useKeep()
  return useMutation({
    mutationFn: (body: { title: string; summary?: string }) => sendJson('POST', '/api/submissions', body, submissionSchema),
    onSuccess: keep,
  })
}

export function usePatchSubmission(id: number | string) {
  const keep = useKeep()
  return useMutation({
    mutationFn: (body: { title?: string; summary?: string; lockVersion: number }) => sendJson('PATCH', address(id), body, submissionSchema),
    onSuccess: keep,
  })
}

export function useDeleteSubmission() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (id: number) => sendJson('DELETE', address(id), undefined, null),
    // Its own page is still shown until the reader is led away, and must not ask for what is gone.
    onSuccess: () => client.invalidateQueries({ queryKey: ['submissions', 'list'] }),
  })
}

export function useAddChange(id: number | string) {
  const keep = useKeep()
  return useMutation({
    mutationFn: (body: ChangeForm) => sendJson('POST', address(id, '/changes'), body, submissionSchema),
    onSuccess: keep,
  })
}

export function usePatchChange(id: number | string) {
  const keep = useKeep()
  return useMutation({
    mutationFn: ({ change, body }: { change: number; body: ChangeForm }) => sendJson('PATCH', address(id, `/changes/${change}`), body, submissionSchema),
    onSuccess: keep,
  })
}

export function useDeleteChange(id: number | string) {
  const keep = useKeep()
  return useMutation({
    mutationFn: (change: number) => sendJson('DELETE', address(id, `/changes/${change}`), undefined, submissionSchema),
    onSuccess: keep,
  })
}

/** Submitting and withdrawing: the author's moves. */
export function useTransition(id: number | string) {
  const keep = useKeep()
  return useMutation({
    mutationFn: ({ event, lockVersion }: { event: 'submit' | 'withdraw'; lockVersion: number }) =>
      sendJson('POST', address(id, `/${event}`), { lockVersion }, submissionSchema),
    onSuccess: keep,
  })
}

export interface Decision {
  verdict: 'approve' | 'return' | 'reject'
  /** Of the version that the reviewer saw. */
  contentHash: string
  note: string
}

/** The reviewer's moves. An approval makes a revision: everything read of the catalogue is read again. */
export function useDecide(id: number | string) {
  const client = useQueryClient()
  const keep = useKeep()
  return useMutation({
    mutationFn: ({ verdict, ...body }: Decision) => sendJson('POST', address(id, `/${verdict}`), body, submissionSchema),
    onSuccess: (submission) => {
      keep(submission)
      // What waits was computed on the revision before: effects, conflicts and checks of all other submissions are read again too.
      const isOfThis = ([resource, part, of]: readonly unknown[]): boolean => resource === 'submissions' && part === 'one' && String(of) === String(id)
      if (submission.state === 'approved') void client.invalidateQueries({ predicate: (q) => !isOfThis(q.queryKey) })
    },
  })
}

export function useRemark(id: number | string) {
  const keep = useKeep()
  return useMutation({
    mutationFn: (body: { change?: number | null; body: string }) => sendJson('POST', address(id, '/remarks'), body, submissionSchema),
    onSuccess: keep,
  })
}
