import { Download } from 'lucide-react'
import { COLUMNS } from '../../../core/columns.ts'
import type { Filter } from '../../../core/filters/filter.ts'
import { printFilter } from '../../../core/filters/print.ts'
import { Button } from '../../components/button.tsx'
import { Menu } from '../../components/menu.tsx'
import { download } from '../../lib/download.ts'
import { formatCounted } from '../../lib/format.ts'
import { shownColumns } from './catalogue-columns.tsx'

const FORMATS = [
  { format: 'csv', label: 'CSV' },
  { format: 'vot', label: 'VOTable' },
] as const

/** The address of a file with all galaxies of the filter, in its order. */
export function exportAddress(filter: Filter, format: 'csv' | 'vot', columns: readonly string[] | null): string {
  const query = printFilter({ ...filter, columns, limit: null, cursor: null }).toString()
  return `/api/export.${format}${query ? `?${query}` : ''}`
}

/** All galaxies of the filter as a file, not only those that are loaded. */
export function DownloadMenu({ filter, total }: { filter: Filter; total: number | undefined }) {
  const shown = shownColumns(filter).map((column) => column.key)
  return (
    <Menu
      label="Download"
      trigger={
        <Button kind="primary" icon={<Download size={16} aria-hidden />} isDisabled={!total}>
          Download
        </Button>
      }
      items={FORMATS.flatMap(({ format, label }) => [
        { id: format, label: `${label}, columns shown`, hint: `${formatCounted(total ?? 0, 'galaxy', 'galaxies')}, ${shown.length} columns`, onAction: () => download(exportAddress(filter, format, shown)) },
        { id: `${format} all`, label: `${label}, all columns`, hint: `${COLUMNS.length} columns`, onAction: () => download(exportAddress(filter, format, null)) },
      ])}
    />
  )
}
