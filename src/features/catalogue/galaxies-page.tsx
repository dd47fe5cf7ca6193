import { Link2, Map as MapIcon, SlidersHorizontal } from 'lucide-react'
import { useCallback, useMemo, useRef, useState } from 'react'
import { useNavigate } from 'react-router-dom'
import { describeFilter, filterChips } from '../../../core/filters/describe.ts'
import { sortOf, type Filter } from '../../../core/filters/filter.ts'
import { printFilter } from '../../../core/filters/print.ts'
import { useFacets, useGalaxies } from '../../api/galaxies.ts'
import { useSummary } from '../../api/summary.ts'
import { useActions } from '../../app/actions/use-actions.ts'
import { Button } from '../../components/button.tsx'
import { DataTable } from '../../components/data-table.tsx'
import { Drawer } from '../../components/drawer.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { FilterChips } from '../../components/filter-chips.tsx'
import { FilterErrors } from '../../components/filter-errors.tsx'
import { IconButton } from '../../components/icon-button.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { choiceOf, useCatalogueFilter } from '../../lib/catalogue-filter.ts'
import { copyText } from '../../lib/clipboard.ts'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'
import { neededColumns, shownColumns, tableColumn } from './catalogue-columns.tsx'
import { ColumnChooser } from './column-chooser.tsx'
import { DownloadMenu } from './download-menu.tsx'
import { FacetPanel } from '../../components/facets/facet-panel.tsx'
import { hostNames } from '../../components/facets/host-names.ts'
import { NameSearch } from './name-search.tsx'
import { NoGalaxies } from './no-galaxies.tsx'

/** More than the table draws at once, so that a page is asked for before the reader reaches the end. */
const PAGE_ROWS = 240

const copyLink = (): void => void copyText(window.location.href, 'the link to this table')

/** The table of galaxies: filters, order and columns stand in the address. */
export default function GalaxiesPage() {
  useDocumentTitle('Galaxies')
  const navigate = useNavigate()
  const { filter, errors, change, drop } = useCatalogueFilter()
  const searchBox = useRef<HTMLInputElement>(null)
  const [isDrawerOpen, setDrawerOpen] = useState(false)
  const columns = useMemo(() => shownColumns(filter), [filter])
  const query = useMemo(() => printFilter({ ...filter, columns: neededColumns(columns), limit: null, cursor: null }).toString(), [filter, columns])
  const usable = errors.length === 0
  const list = useGalaxies(query, PAGE_ROWS, usable)
  const facets = useFacets(choiceOf(filter), usable)
  const labels = useMemo(() => hostNames(facets.data), [facets.data])
  const tableColumns = useMemo(() => columns.map((column) => tableColumn(column, { names: labels, at: filter.at })), [columns, labels, filter.at])
  const rows = useMemo(() => list.data?.pages.flatMap((page) => page.rows) ?? [], [list.data])
  const total = list.data?.pages[0]?.total
  const { hasNextPage, isFetchingNextPage, fetchNextPage } = list
  const loadMore = useCallback(() => {
    if (hasNextPage && !isFetchingNextPage) void fetchNextPage()
  }, [hasNextPage, isFetchingNextPage, fetchNextPage])
  useActions([
    { name: 'galaxies.search', label: 'Search the names', keys: '/', group: 'Table', perform: () => searchBox.current?.focus() },
    { name: 'galaxies.copy-link', label: 'Copy the link to this table', group: 'Table', perform: copyLink },
  ])
  const [sort] = sortOf(filter)
  const inForce = filterChips(filter, labels).length
  return (
    <div className="page">
      <PageHeader
        title="Galaxies"
        aside={total !== undefined && <Aside total={total} revision={list.data?.pages[0]?.revision} at={filter.at} />}
        actions={
          <>
            <Link look="button" to={withQuery(paths.sky, Object.fromEntries(new URLSearchParams(choiceOf(filter))))}>
              <MapIcon size={16} aria-hidden />
              On the sky
            </Link>
            <DownloadMenu filter={filter} total={total} />
          </>
        }
      />
      <FilterErrors errors={errors} onDrop={drop} />
      {usable && <div className="grid gap-6 lg:grid-cols-[17rem_minmax(0,1fr)]">
        <aside aria-label="Filters" className="hidden lg:block">
          <FacetPanel facets={facets.data} filter={filter} onChange={change} />
        </aside>
        <div className="min-w-0">
          <Sentence filter={filter} labels={labels} onChange={change} />
          {list.isError && rows.length === 0 ? (
            <FailedState error={list.error} onRetry={() => void list.refetch()} safe="Nothing was changed; the filters stand in the address." />
          ) : (
            <DataTable
              label="Galaxies"
              columns={tableColumns}
              rows={rows}
              rowKey={(row) => String(row.slug)}
              sort={sort ? { key: sort.column, direction: sort.descending ? 'descending' : 'ascending' } : null}
              onSortChange={({ key, direction }) => change({ ...filter, sort: key === 'name' && direction === 'ascending' ? [] : [{ column: key, descending: direction === 'descending' }] })}
              onRowAction={(row) => void navigate(withQuery(paths.galaxy(String(row.slug)), { at: filter.at }))}
              isLoading={list.isPending}
              onReachEnd={loadMore}
              countText={countWords(rows.length, total)}
              maxHeight="max(24rem, calc(100dvh - 19rem))"
              toolbar={
                <>
                  <NameSearch filter={filter} onChange={change} inputRef={searchBox} />
                  <div className="lg:hidden">
                    <Button icon={<SlidersHorizontal size={16} aria-hidden />} onPress={() => setDrawerOpen(true)}>
                      {inForce > 0 ? `Filters (${inForce})` : 'Filters'}
                    </Button>
                  </div>
                  <ColumnChooser filter={filter} onChange={change} />
                  <IconButton label="Copy the link" icon={<Link2 size={16} aria-hidden />} onPress={copyLink} />
                </>
              }
              empty={<NoGalaxies filter={filter} labels={labels} onChange={change} />}
            />
          )}
        </div>
      </div>}
      <Drawer
        title="Filters"
        isOpen={isDrawerOpen}
        onOpenChange={setDrawerOpen}
        footer={
          <Button kind="primary" onPress={() => setDrawerOpen(false)}>
            {total === undefined ? 'Show' : `Show ${formatCounted(total, 'galaxy', 'galaxies')}`}
          </Button>
        }
      >
        <FacetPanel facets={facets.data} filter={filter} onChange={change} />
      </Drawer>
    </div>
  )
}

function countWords(loaded: number, total: number | undefined): string | undefined {
  if (total === undefined) return undefined
  return loaded < total ? `${loaded} of ${formatCounted(total, 'galaxy', 'galaxies')} loaded` : formatCounted(total, 'galaxy', 'galaxies')
}

/** How many, and which state of the catalogue they are read from. */
function Aside({ total, revision, at }: { total: number; revision: number | undefined; at: string | null }) {
  const newest = useSummary().data?.release
  const release = at !== null && !/^\d+$/.test(at) ? at : newest?.revision === revision ? newest?.label : undefined
  const state = release !== undefined ? ` · release ${release}` : revision !== undefined ? ` · revision ${revision}` : ''
  return `${formatCounted(total, 'galaxy', 'galaxies')}${state}`
}

/** The filter as chips and as a sentence. */
function Sentence({ filter, labels, onChange }: { filter: Filter; labels: Readonly<Record<string, string>>; onChange: (filter: Filter) => void }) {
  const inForce = filterChips(filter, labels).length > 0
  return (
    <div className="mb-3 grid min-h-8 gap-2 empty:hidden">
      <FilterChips filter={filter} labels={labels} onChange={onChange} />
      <p className="font-serif text-base text-muted">{`${inForce ? describeFilter(filter, labels) : 'All galaxies'}.`}</p>
    </div>
  )
}
