import { useState } from 'react'
import { releaseInputSchema } from '../../../core/schema/releases.ts'
import { fieldError } from '../../api/client.ts'
import { usePublish } from '../../api/releases.ts'
import { Button } from '../../components/button.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'
import { notify } from '../../components/toast.tsx'

interface PublishDialogProps {
  isOpen: boolean
  onOpenChange: (isOpen: boolean) => void
  /** The revision that would get the label. */
  revision: number | null
}

/** Publishes the current revision under a label. It cannot be undone, and says so before. */
export function PublishDialog({ isOpen, onOpenChange, revision }: PublishDialogProps) {
  const publish = usePublish()
  const [typed, setTyped] = useState({ label: '', title: '', notes: '' })
  const [tried, setTried] = useState(false)
  const parsed = releaseInputSchema.safeParse(typed)
  const errorOf = (field: keyof typeof typed): string | undefined => {
    const own = tried && !parsed.success ? parsed.error.issues.find((i) => i.path[0] === field)?.message : undefined
    return own ?? fieldError(publish.error, field)
  }
  const set = (field: keyof typeof typed) => (value: string) => setTyped((now) => ({ ...now, [field]: value }))
  const send = (): void => {
    setTried(true)
    if (!parsed.success) return
    publish.mutate(parsed.data, {
      onSuccess: (release) => {
        notify(`Release ${release.label} is published: visitors now read revision ${release.revision}.`, { tone: 'good' })
        setTyped({ label: '', title: '', notes: '' })
        setTried(false)
        onOpenChange(false)
      },
    })
  }
  return (
    <Dialog
      title="Publish a release"
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      footer={
        <>
          <Button onPress={() => onOpenChange(false)}>Cancel</Button>
          <Button kind="primary" onPress={send} isPending={publish.isPending}>Publish</Button>
        </>
      }
    >
      <div className="grid gap-4">
        <p>
          {revision === null ? 'There is no revision yet to publish.' : `Revision ${revision} gets the label. From then on visitors read it, and it can be neither changed nor taken back.`}
        </p>
        <TextField label="Label" value={typed.label} onChange={set('label')} error={errorOf('label')} help="Such as 2026.2" autoFocus />
        <TextField label="Title" value={typed.title} onChange={set('title')} error={errorOf('title')} />
        <TextArea label="Notes" rows={5} value={typed.notes} onChange={set('notes')} error={errorOf('notes')} help="What changed since the last one, for the people who will use it" />
        {publish.isError && <ProblemNote error={publish.error} />}
      </div>
    </Dialog>
  )
}
