import { useEffect, useRef, useState } from 'react'
import type { Effect, SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { ApiProblem } from '../../api/client.ts'
import { useDecide } from '../../api/submissions.ts'
import { Button } from '../../components/button.tsx'
import { ConflictTable } from '../../components/curation/conflict-table.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { formatCounted } from '../../lib/format.ts'
import { useKeptForm } from '../../lib/kept-form.ts'
import type { Verdict } from './bench.tsx'

interface Props {
  submission: SubmissionAnswer
  effect: Effect | undefined
  verdict: Verdict
  onClose: () => void
  onDecided: (answer: SubmissionAnswer) => void
  /** Reads the submission again, after somebody changed it. */
  onReread: () => Promise<unknown>
}

const WORDS: Readonly<Record<Verdict, { title: string; button: string; label: string; help: string }>> = {
  approve: { title: 'Approve', button: 'Approve', label: 'Note (optional)', help: 'Kept with the revision.' },
  return: { title: 'Return to its author', button: 'Return', label: 'What must be mended', help: 'The author reads this, mends the submission and submits it again.' },
  reject: { title: 'Reject', button: 'Reject', label: 'Why it is rejected', help: 'The author reads this. A rejected submission stays as it is; another one may be made.' },
}

const LEAST_NOTE = 3

/** The last step of a decision. It speaks of the version that was read; if another one is there by now, nothing happens and the note stays. */
export function DecisionForm({ submission, effect, verdict, onClose, onDecided, onReread }: Props) {
  const { kept, keep } = useKeptForm<string>(`review.${submission.id}.note`)
  const [note, setNote] = useState(kept ?? '')
  const [tried, setTried] = useState(false)
  const decide = useDecide(submission.id)
  const area = useRef<HTMLTextAreaElement>(null)
  const form = useRef<HTMLFormElement>(null)
  const words = WORDS[verdict]
  const needsNote = verdict !== 'approve'
  const error = needsNote && tried && note.trim().length < LEAST_NOTE ? 'Say why, so that the author can mend it.' : undefined

  // After a refusal's key the note is what comes next; after an approval's, its button.
  useEffect(() => {
    form.current?.scrollIntoView({ block: 'nearest' })
    if (needsNote) area.current?.focus()
    else form.current?.querySelector<HTMLButtonElement>('button[type=submit]')?.focus()
  }, [needsNote])

  const send = (): void => {
    setTried(true)
    if (decide.isPending || submission.contentHash === null || (needsNote && note.trim().length < LEAST_NOTE)) return
    decide.mutate(
      { verdict, contentHash: submission.contentHash, note: note.trim() },
      {
        onSuccess: (answer) => {
          keep(null)
          onDecided(answer)
        },
      },
    )
  }
  const problem = decide.error instanceof ApiProblem ? decide.error : null
  return (
    <Sheet title={words.title} selected actions={<Button size="small" kind="plain" keys="Esc" onPress={onClose}>Not yet</Button>}>
      <form
        ref={form}
        aria-label={words.title}
        className="grid gap-4"
        onSubmit={(event) => {
          event.preventDefault()
          send()
        }}
        onKeyDown={(event) => {
          if (event.key === 'Escape') onClose()
          if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) {
            event.preventDefault()
            send()
          }
        }}
      >
        {verdict === 'approve' && effect && <p>{promise(effect)}</p>}
        <TextArea
          label={words.label}
          rows={needsNote ? 3 : 2}
          value={note}
          areaRef={area}
          isRequired={needsNote}
          error={error}
          help={words.help}
          onChange={(next) => {
            setNote(next)
            keep(next)
          }}
        />
        {decide.isError && <ProblemNote error={decide.error} safe="Your note is kept." />}
        {problem && problem.conflicts.length > 0 && <ConflictTable conflicts={problem.conflicts} />}
        <div className="flex flex-wrap gap-2.5">
          <Button type="submit" kind={verdict === 'reject' ? 'danger' : 'primary'} isPending={decide.isPending}>{words.button}</Button>
          {problem?.status === 409 && (
            <Button
              onPress={() =>
                void onReread().then(() => {
                  decide.reset()
                })
              }
            >
              Read it as it is now
            </Button>
          )}
        </div>
      </form>
    </Sheet>
  )
}

function promise({ revision, counts }: Effect): string {
  const moved = counts.galaxiesAdded + counts.galaxiesChanged
  return `This makes revision ${revision + 1}: ${formatCounted(counts.measurements, 'measurement')}, ${formatCounted(moved, 'galaxy', 'galaxies')} with other values.`
}
