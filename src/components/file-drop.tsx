import { FileUp } from 'lucide-react'
import { useId } from 'react'
import { DropZone, FileTrigger, isFileDropItem, Text } from 'react-aria-components'
import { Button } from './button.tsx'

export interface FileDropProps {
  label: string
  /** MIME types and endings, as `accept` of a file input: `['text/csv', '.vot']`. The server judges by content. */
  accept?: readonly string[]
  onFiles: (files: File[]) => void
  multiple?: boolean
  help?: string
  error?: string
  isBusy?: boolean
}

/** Choosing files: by button, by dropping, by pasting. */
export function FileDrop({ label, accept, onFiles, multiple, help, error, isBusy }: FileDropProps) {
  const errorId = useId()
  const take = (files: File[]): void => {
    if (files.length > 0) onFiles(multiple ? files : files.slice(0, 1))
  }
  return (
    <div>
      <DropZone
        isDisabled={isBusy}
        aria-describedby={error ? errorId : undefined}
        onDrop={(event) => {
          void Promise.all(event.items.filter(isFileDropItem).map((item) => item.getFile())).then(take)
        }}
        className="flex flex-col items-center gap-3 rounded-lg border border-dashed border-edge px-6 py-8 text-center data-drop-target:border-accent data-drop-target:bg-accent-soft"
      >
        <FileUp size={24} aria-hidden className="text-muted" />
        <Text slot="label">{label}</Text>
        <FileTrigger acceptedFileTypes={accept} allowsMultiple={multiple} onSelect={(list) => take(list ? [...list] : [])}>
          <Button isPending={isBusy}>{multiple ? 'Choose files' : 'Choose a file'}</Button>
        </FileTrigger>
        {help && <p className="max-w-md text-xs text-muted">{help}</p>}
      </DropZone>
      {error && (
        <p id={errorId} role="alert" className="mt-1 text-xs text-stop">
          {error}
        </p>
      )}
    </div>
  )
}
