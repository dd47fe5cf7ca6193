import { useState } from 'react'
import { useNavigate, useSearchParams } from 'react-router-dom'
import { submissionInputSchema } from '../../../core/schema/submissions.ts'
import { useCreateSubmission } from '../../api/submissions.ts'
import { Button } from '../../components/button.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { useKeptForm } from '../../lib/kept-form.ts'
import { paths, withQuery } from '../../paths.ts'

interface Typed {
  title: string
  summary: string
}

/** What a draft is called that begins with a change of this kind. */
const WHAT: Readonly<Record<string, string>> = {
  'measurement.replace': 'mended measurement', 'measurement.exclude': 'measurement excluded', 'measurement.restore': 'measurement restored', 'galaxy.amend': 'amended',
  'override.set': 'override', 'override.clear': 'override cleared', 'name.add': 'new name',
}

/** Begins a draft. `?galaxy=` and `?add=` lead straight on to the first change. */
export default function NewSubmissionPage() {
  useDocumentTitle('New submission')
  const navigate = useNavigate()
  const [search] = useSearchParams()
  const galaxy = search.get('name') ?? search.get('galaxy')
  const create = useCreateSubmission()
  const { kept, keep } = useKeptForm<Typed>('submission.new')
  const [typed, setTyped] = useState<Typed>(kept ?? { title: galaxy ? `${galaxy}: ${WHAT[search.get('add') ?? ''] ?? 'new measurement'}` : '', summary: '' })
  const [tried, setTried] = useState(false)
  const parsed = submissionInputSchema.safeParse(typed)
  const titleError = tried && !parsed.success ? parsed.error.issues.find((i) => i.path[0] === 'title')?.message : undefined
  const change = (part: Partial<Typed>): void => {
    const next = { ...typed, ...part }
    setTyped(next)
    keep(next)
  }
  const begin = (): void => {
    setTried(true)
    if (!parsed.success) return
    create.mutate(parsed.data, {
      onSuccess: (submission) => {
        keep(null)
        void navigate(withQuery(paths.submission(submission.id), { add: search.get('add') ?? 'measurement.add', galaxy: search.get('galaxy'), name: search.get('name'), measurement: search.get('measurement'), about: search.get('about') }), { replace: true })
      },
    })
  }
  return (
    <div className="page">
      <PageHeader title="New submission" breadcrumbs={[{ label: 'Submissions', href: paths.submissions }]} />
      <Sheet className="max-w-2xl">
        <form
          className="grid grid-cols-[minmax(0,1fr)] gap-4"
          onSubmit={(event) => {
            event.preventDefault()
            begin()
          }}
        >
          <TextField label="Title" value={typed.title} onChange={(title) => change({ title })} error={titleError} help="What the approver sees in the queue: TRGB distances of four dwarfs" autoFocus />
          <TextArea label="Summary" rows={4} value={typed.summary} onChange={(summary) => change({ summary })} help="What changes, and why it should be believed. It can be written later." />
          {create.isError && <ProblemNote error={create.error} safe="What you typed is kept." />}
          <div>
            <Button type="submit" kind="primary" isPending={create.isPending}>Begin the draft</Button>
          </div>
        </form>
      </Sheet>
    </div>
  )
}
