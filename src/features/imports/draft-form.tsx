import { useState } from 'react'
import { importDraftSchema, type ImportAnswer } from '../../../core/schema/imports.ts'
import { fieldError } from '../../api/client.ts'
import { useMakeDraft } from '../../api/imports.ts'
import { Button } from '../../components/button.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'
import { notify } from '../../components/toast.tsx'
import { formatCounted } from '../../lib/format.ts'
import { useKeptForm } from '../../lib/kept-form.ts'
import { paths } from '../../paths.ts'

interface Typed {
  title: string
  summary: string
}

/** Makes a draft of the rows that are in order; those to mend stay here. */
export function DraftForm({ id, held, isReading }: { id: string; held: ImportAnswer; isReading: boolean }) {
  const make = useMakeDraft(id)
  const { kept, keep } = useKeptForm<Typed>(`import.${id}.draft`)
  const [typed, setTyped] = useState<Typed>(kept ?? { title: held.fileName.replace(/\.[a-z]{2,4}$/i, ''), summary: '' })
  const [tried, setTried] = useState(false)
  const parsed = importDraftSchema.safeParse(typed)
  const titleError = fieldError(make.error, 'title') ?? (tried && !parsed.success ? parsed.error.issues.find((i) => i.path[0] === 'title')?.message : undefined)
  const change = (part: Partial<Typed>): void => {
    const next = { ...typed, ...part }
    setTyped(next)
    keep(next)
  }
  const begin = (): void => {
    setTried(true)
    if (!parsed.success) return
    make.mutate(parsed.data, {
      onSuccess: (made) => {
        keep(null)
        notify(`${formatCounted(made.changes, 'change')} drafted${made.left > 0 ? `; ${formatCounted(made.left, 'row')} to mend stay here` : ''}.`, { tone: 'good' })
      },
    })
  }
  return (
    <Sheet title="Make a draft">
      <form
        className="grid max-w-2xl gap-4"
        onSubmit={(event) => {
          event.preventDefault()
          begin()
        }}
      >
        <TextField label="Title" value={typed.title} onChange={(title) => change({ title })} error={titleError} help="What the approver sees in the queue" />
        <TextArea label="Summary" rows={2} value={typed.summary} onChange={(summary) => change({ summary })} help="Where the table is from, and why it should be believed" />
        {make.isError && <ProblemNote error={make.error} />}
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          <Button type="submit" kind="primary" isDisabled={held.rowsOk === 0 || isReading} isPending={make.isPending}>
            Make a draft of {formatCounted(held.rowsOk, 'row')}
          </Button>
          {held.rowsBad > 0 && <p className="text-muted">{formatCounted(held.rowsBad, 'row')} to mend stay in this import.</p>}
        </div>
        {make.data && (
          <p role="status" className="rounded-md border border-good bg-good-soft px-4 py-3">
            {formatCounted(make.data.changes, 'change')} drafted. <Link to={paths.submission(make.data.submission)}>Open the draft</Link> to look at the effect and submit it.
          </p>
        )}
      </form>
    </Sheet>
  )
}
