import { Copy, Download, Rows3, Rows4 } from 'lucide-react'
import type { ReactNode } from 'react'
import { useLocalSetting } from '../lib/local-setting.ts'
import { rowDensitySetting } from '../lib/row-density.ts'
import { IconButton } from './icon-button.tsx'

export interface DataTableToolsProps {
  toolbar: ReactNode
  showTools: boolean
  count: string
  /** Missing while there is nothing to copy. */
  onCopy: (() => void) | undefined
  onSave: (() => void) | undefined
}

export function DataTableTools({ toolbar, showTools, count, onCopy, onSave }: DataTableToolsProps) {
  const [density, setDensity] = useLocalSetting(rowDensitySetting)
  const isDense = density === 'dense'
  return (
    <div className="mb-2 flex min-h-9 flex-wrap items-center justify-between gap-3">
      <div className="flex flex-wrap items-center gap-2">{toolbar}</div>
      {showTools && (
        <div className="flex items-center gap-1">
          <span role="status" className="figures mr-2 text-muted">
            {count}
          </span>
          <IconButton
            label={isDense ? 'Taller rows' : 'Lower rows'}
            icon={isDense ? <Rows3 size={16} aria-hidden /> : <Rows4 size={16} aria-hidden />}
            onPress={() => setDensity(isDense ? 'comfortable' : 'dense')}
          />
          <IconButton label="Copy as TSV" icon={<Copy size={16} aria-hidden />} isDisabled={!onCopy} onPress={onCopy} />
          {onSave && <IconButton label="Save as TSV" icon={<Download size={16} aria-hidden />} onPress={onSave} />}
        </div>
      )}
    </div>
  )
}
