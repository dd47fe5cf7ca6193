import type { ReactNode } from 'react'
import { Button } from '../../components/button.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'

interface Props {
  save: () => Promise<void>
  /** Whether it is added, not rewritten. */
  isNew: boolean
  isSaving: boolean
  error: unknown
  children: ReactNode
}

/** What the forms of all changes have about their fields: Enter sends, what went wrong is said beside the button. */
export function ChangeFormFrame({ save, isNew, isSaving, error, children }: Props) {
  return (
    <form
      className="grid grid-cols-[minmax(0,1fr)] gap-4"
      onSubmit={(event) => {
        event.preventDefault()
        void save()
      }}
    >
      {children}
      {error ? <ProblemNote error={error} safe="What you typed is kept." /> : null}
      <div>
        <Button type="submit" kind="primary" isPending={isSaving}>{isNew ? 'Add to the draft' : 'Save'}</Button>
      </div>
    </form>
  )
}
