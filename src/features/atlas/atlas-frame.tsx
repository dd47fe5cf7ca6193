import { Download, SlidersHorizontal, Table2 } from 'lucide-react'
import { useState, type ReactNode } from 'react'
import type { FigureRecipe, View } from '../../../core/figure/recipe.ts'
import { useActions } from '../../app/actions/use-actions.ts'
import { Button } from '../../components/button.tsx'
import { Drawer } from '../../components/drawer.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FacetPanel } from '../../components/facets/facet-panel.tsx'
import { RangeFacet } from '../../components/facets/range-facet.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { FilterChips } from '../../components/filter-chips.tsx'
import { FilterErrors } from '../../components/filter-errors.tsx'
import { Link } from '../../components/link.tsx'
import { ExportDialog } from '../../components/maps/export-dialog.tsx'
import { MapLegend } from '../../components/maps/map-legend.tsx'
import { RecipeControls } from '../../components/maps/recipe-controls.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { paths, withQuery } from '../../paths.ts'
import { SelectionCard } from './selection-card.tsx'
import type { Atlas } from './use-atlas.ts'

export interface AtlasFrameProps {
  atlas: Atlas
  view: View
  title: ReactNode
  /** The map or maps. */
  children: ReactNode
  /** The recipe as it is drawn, for export. */
  recipe: FigureRecipe
  onCentre?: (slug: string) => void
}

const OTHER: Readonly<Record<View, { view: View; label: string; path: string }>> = {
  sky: { view: 'plane', label: 'The plane', path: paths.plane },
  plane: { view: 'sky', label: 'The sky', path: paths.sky },
}

/** The room that the distances take, px, kept while they come. */
const DISTANCE_HEIGHT = 94

/** What stands around a map: title, filter, how it is drawn, the galaxy chosen, export. */
export function AtlasFrame({ atlas, view, title, children, recipe, onCentre }: AtlasFrameProps) {
  const [isFiltering, setFiltering] = useState(false)
  const [isExporting, setExporting] = useState(false)
  const { filter, data, facets } = atlas
  const sameFilter = Object.fromEntries(new URLSearchParams(atlas.query))
  const other = OTHER[view]
  useActions([{ name: 'atlas.export', label: 'Export a figure', keys: 'e', group: 'Map', when: data.galaxies.length > 0, perform: () => setExporting(true) }])
  const distance = facets?.histograms.distance
  const isEmpty = data.revision !== null && data.galaxies.length === 0
  return (
    <div className="page">
      <PageHeader
        title={title}
        aside={atlas.aside}
        actions={
          <>
            <Link look="button" to={withQuery(other.path, { ...sameFilter, galaxy: atlas.selected })}>{other.label}</Link>
            <Link look="button" to={withQuery(paths.galaxies, sameFilter)}>
              <Table2 size={16} aria-hidden />
              As a table
            </Link>
            <Button kind="primary" icon={<Download size={16} aria-hidden />} isDisabled={data.galaxies.length === 0} onPress={() => setExporting(true)}>
              Export
            </Button>
          </>
        }
      />
      <FilterErrors errors={atlas.errors} onDrop={atlas.drop} />
      <div className="grid gap-6 lg:grid-cols-[minmax(0,1fr)_19rem]">
        <div className="min-w-0">
          <div className="mb-3 flex min-h-9 flex-wrap items-center gap-x-4 gap-y-2">
            <Button size="small" icon={<SlidersHorizontal size={14} aria-hidden />} onPress={() => setFiltering(true)}>Filter</Button>
            {atlas.chips.length > 0 || filter.at !== null ? <FilterChips filter={filter} labels={atlas.labels} onChange={atlas.change} /> : <span className="text-muted">All galaxies of the catalogue</span>}
          </div>
          {data.isError ? <FailedState error={data.error} onRetry={data.refetch} safe="Nothing was changed; the filters stand in the address." /> : children}
          {isEmpty && (
            <EmptyState title="No galaxy passes these filters" action={atlas.chips.length > 0 && <Link look="button" to={withQuery(paths.galaxies, sameFilter)}>See which filter keeps them out</Link>}>
              The map is drawn without galaxies. Remove a filter above, or choose wider ones.
            </EmptyState>
          )}
          <MapLegend galaxies={data.galaxies} recipe={recipe} />
        </div>
        <div className="grid content-start gap-5">
          <Sheet title="Draw">
            <RecipeControls recipe={atlas.recipe} onChange={atlas.changeRecipe} withAxes={false}>
              <div style={{ minHeight: DISTANCE_HEIGHT }}>{distance && <RangeFacet column="distance" histogram={distance} filter={filter} onChange={atlas.change} />}</div>
            </RecipeControls>
          </Sheet>
          <div className="max-lg:order-first">
            <SelectionCard slug={atlas.selected} at={filter.at} onCentre={onCentre} />
          </div>
        </div>
      </div>
      <Drawer title="Filters" isOpen={isFiltering} onOpenChange={setFiltering} footer={<Button kind="primary" onPress={() => setFiltering(false)}>{`Show ${data.galaxies.length}`}</Button>}>
        <FacetPanel facets={facets} filter={filter} onChange={atlas.change} />
      </Drawer>
      {isExporting && (
        <ExportDialog
          recipe={{ ...recipe, filter: withoutAt(atlas.query), at: filter.at ?? undefined }}
          data={data}
          sentence={atlas.chips.length > 0 ? `${atlas.sentence}.` : ''}
          onClose={() => setExporting(false)}
        />
      )}
    </div>
  )
}

/** A recipe names its revision by itself. */
function withoutAt(query: string): string {
  const parameters = new URLSearchParams(query)
  parameters.delete('at')
  return parameters.toString()
}
