import { useEffect, useRef, useState } from 'react'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { ApiProblem } from '../../api/client.ts'
import { usePatchSubmission } from '../../api/submissions.ts'
import { ProblemNote } from '../../components/failed-state.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'
import { useKeptForm } from '../../lib/kept-form.ts'
import { formatClock } from '../../lib/format.ts'

const DELAY_MS = 1000

/** Title and summary, saved as they are typed; what the server has not yet taken is kept on this device. */
export function SummaryEditor({ submission }: { submission: SubmissionAnswer }) {
  const { kept, keep } = useKeptForm<{ title: string; summary: string }>(`submission.${submission.id}.summary`)
  const [typed, setTyped] = useState(kept ?? { title: submission.title, summary: submission.summary })
  const patch = usePatchSubmission(submission.id)
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined)
  const differs = typed.title !== submission.title || typed.summary !== submission.summary
  const { mutate, isPending } = patch
  const { lockVersion } = submission

  useEffect(() => {
    if (!differs || isPending || typed.title.trim() === '') return
    timer.current = setTimeout(() => mutate({ ...typed, lockVersion }, { onSuccess: () => keep(null) }), DELAY_MS)
    return () => clearTimeout(timer.current)
  }, [typed, differs, isPending, lockVersion, mutate, keep])

  const change = (part: Partial<typeof typed>): void => {
    const next = { ...typed, ...part }
    setTyped(next)
    keep(next)
  }
  const offline = patch.error instanceof ApiProblem && patch.error.status === 0
  const state = patch.isError ? (offline ? 'Not saved: kept on this device' : 'Not saved') : differs || isPending ? 'Saving …' : `Saved ${formatClock(submission.updatedAt)}`
  return (
    <Sheet title="Title and summary" actions={<span role="status" className="text-sm text-muted">{state}</span>}>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
        <TextField label="Title" value={typed.title} onChange={(title) => change({ title })} error={typed.title.trim() === '' ? 'Give it a title.' : undefined} />
        <TextArea label="Summary" rows={3} value={typed.summary} onChange={(summary) => change({ summary })} help="What changes, and why it should be believed" />
        {patch.isError && <ProblemNote error={patch.error} safe="What you typed is kept on this page." />}
      </div>
    </Sheet>
  )
}
