import { useCallback, useMemo } from 'react'
import { useSearchParams } from 'react-router-dom'
import type { Filter } from '../../core/filters/filter.ts'
import { parseFilter, type FilterError } from '../../core/filters/parse.ts'
import { printFilter } from '../../core/filters/print.ts'

export interface CatalogueFilter {
  filter: Filter
  /** What of the address could not be understood; the rest of it is in `filter`. */
  errors: readonly FilterError[]
  /** Writes a filter into the address. @param replace - without a new entry in the browser's history */
  change: (filter: Filter, replace?: boolean) => void
  /** Takes one parameter out of the address, understood or not. */
  drop: (parameter: string) => void
  /** Parameters of the address that belong to the page itself. */
  own: URLSearchParams
  /** Sets (or, with null, takes out) parameters of the page itself. */
  changeOwn: (parts: Readonly<Record<string, string | null>>, replace?: boolean) => void
}

const NONE: readonly string[] = []

/**
 * The filter that the page's address holds: the address is the state, so that every screen can be linked.
 *
 * @param ownKeys - parameters that are the page's own and no part of the filter; must not change from call to call
 */
export function useCatalogueFilter(ownKeys: readonly string[] = NONE): CatalogueFilter {
  const [search, setSearch] = useSearchParams()
  const { parsed, own } = useMemo(() => {
    const ofFilter = new URLSearchParams(search)
    const ofPage = new URLSearchParams()
    for (const key of ownKeys) {
      const value = search.get(key)
      if (value !== null) ofPage.set(key, value)
      ofFilter.delete(key)
    }
    return { parsed: parseFilter(ofFilter), own: ofPage }
  }, [search, ownKeys])

  const change = useCallback(
    (filter: Filter, replace = false) =>
      setSearch(
        (before) => {
          const next = printFilter({ ...filter, cursor: null })
          for (const key of ownKeys) {
            const value = before.get(key)
            if (value !== null) next.set(key, value)
          }
          return next
        },
        { replace, preventScrollReset: true },
      ),
    [setSearch, ownKeys],
  )
  const changeOwn = useCallback(
    (parts: Readonly<Record<string, string | null>>, replace = false) =>
      setSearch(
        (before) => {
          const next = new URLSearchParams(before)
          for (const [key, value] of Object.entries(parts)) {
            if (value === null || value === '') next.delete(key)
            else next.set(key, value)
          }
          return next
        },
        { replace, preventScrollReset: true },
      ),
    [setSearch],
  )
  const drop = useCallback((parameter: string) => changeOwn({ [parameter]: null }), [changeOwn])
  return { ...parsed, change, drop, own, changeOwn }
}

/** What chooses the galaxies, as a query string: without order, columns and page. One spelling a choice. */
export function choiceOf(filter: Filter): string {
  return printFilter({ ...filter, columns: null, sort: [], limit: null, cursor: null }).toString()
}
