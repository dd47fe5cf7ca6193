import { useCallback, useMemo } from 'react'
import { useNavigate } from 'react-router-dom'
import { describeFilter, filterChips } from '../../../core/filters/describe.ts'
import type { FigureRecipe, View } from '../../../core/figure/recipe.ts'
import { useFacets } from '../../api/galaxies.ts'
import { hostNames } from '../../components/facets/host-names.ts'
import { useMapData } from '../../components/maps/map-data.ts'
import { choiceOf, useCatalogueFilter } from '../../lib/catalogue-filter.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'
import { CHOSEN, MAP_KEYS, readRecipe, writeRecipe } from './map-state.ts'

/** What both atlas pages share: the filter and the map in the address, the galaxies, the one that is chosen. */
export function useAtlas(view: View) {
  const catalogue = useCatalogueFilter(MAP_KEYS[view])
  const { filter, errors, own, changeOwn } = catalogue
  const navigate = useNavigate()
  const usable = errors.length === 0
  const query = choiceOf(filter)
  const data = useMapData(query, usable)
  const facets = useFacets(query, usable)
  const labels = useMemo(() => hostNames(facets.data), [facets.data])
  const recipe = useMemo(() => readRecipe(view, own), [view, own])
  const selected = own.get(CHOSEN)
  const { at } = filter
  const select = useCallback((slug: string | null) => changeOwn({ [CHOSEN]: slug }, true), [changeOwn])
  const open = useCallback((slug: string) => void navigate(withQuery(paths.galaxy(slug), { at })), [navigate, at])
  const changeRecipe = useCallback((next: FigureRecipe) => changeOwn(writeRecipe(next), true), [changeOwn])
  const chips = filterChips(filter, labels)
  // Words from the start, so that nothing moves when the galaxies are there.
  const aside = data.revision === null ? 'reading the galaxies' : `${formatCounted(data.galaxies.length, 'galaxy', 'galaxies')} · ${/^revision/.test(data.releaseLabel) ? data.releaseLabel : `release ${data.releaseLabel}`}`
  return { ...catalogue, usable, query, data, facets: facets.data, labels, recipe, changeRecipe, selected, select, open, chips, aside, sentence: chips.length > 0 ? describeFilter(filter, labels) : 'All galaxies' }
}

export type Atlas = ReturnType<typeof useAtlas>
