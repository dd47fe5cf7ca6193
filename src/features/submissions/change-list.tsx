import { useState } from 'react'
import type { ChangeForm } from '../../../core/schema/changes.ts'
import type { ChangeAnswer, SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { useAddChange, useDeleteChange } from '../../api/submissions.ts'
import { Button } from '../../components/button.tsx'
import { ChangeCard } from '../../components/curation/change-card.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { notify } from '../../components/toast.tsx'
import { formatCounted } from '../../lib/format.ts'
import { ChangeForms } from './change-forms.tsx'

/** So many changes are shown at a time: a whole table of a paper can be hundreds. */
const PAGE = 20

/** The changes of a submission; while it is a draft, each can be edited and removed. */
export function ChangeList({ submission }: { submission: SubmissionAnswer }) {
  const [shown, setShown] = useState(PAGE)
  const [editing, setEditing] = useState<number | null>(null)
  const remove = useDeleteChange(submission.id)
  const restore = useAddChange(submission.id)
  const { items, may } = submission
  if (items.length === 0) {
    return <EmptyState title="No changes yet">Add a measurement, a galaxy or a name; nothing reaches the catalogue before somebody else approves it.</EmptyState>
  }
  const takeOut = (change: ChangeAnswer): void =>
    remove.mutate(change.id, {
      onSuccess: () =>
        notify(`${change.subject}: removed from the draft.`, {
          action: { label: 'Undo', onPress: () => restore.mutate({ action: change.action, payload: change.payload } as ChangeForm) },
        }),
    })
  return (
    <section aria-label="Changes" className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
      {remove.isError && <ProblemNote error={remove.error} />}
      {restore.isError && <ProblemNote error={restore.error} />}
      {items.slice(0, shown).map((change, i) => (
        <ChangeCard
          key={change.id}
          change={change}
          number={i + 1}
          of={items.length}
          actions={
            may.edit && (
              <>
                <Button size="small" onPress={() => setEditing(editing === change.id ? null : change.id)}>{editing === change.id ? 'Close' : 'Edit'}</Button>
                <Button size="small" isDisabled={remove.isPending} onPress={() => takeOut(change)}>Remove</Button>
              </>
            )
          }
        >
          {editing === change.id && (
            <div className="mt-5 border-t border-line pt-5">
              <ChangeForms submission={submission} action={change.action} change={change} onDone={() => setEditing(null)} />
            </div>
          )}
        </ChangeCard>
      ))}
      {items.length > shown && (
        <div>
          <Button onPress={() => setShown(shown + PAGE)}>Show {formatCounted(Math.min(PAGE, items.length - shown), 'more change')} of {items.length - shown}</Button>
        </div>
      )}
    </section>
  )
}
