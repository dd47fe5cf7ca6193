import { describeFilter, filterChips } from '../../../core/filters/describe.ts'
import { parseFilter } from '../../../core/filters/parse.ts'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import { useReleases } from '../../api/releases.ts'
import { Link } from '../../components/link.tsx'
import { Select } from '../../components/select.tsx'
import { paths, withQuery } from '../../paths.ts'

const NEWEST = 'newest'

/** Which galaxies a figure shows, and as of which release: with one named, the figure never changes. */
export function WhichGalaxies({ recipe, onChange }: { recipe: FigureRecipe; onChange: (recipe: FigureRecipe) => void }) {
  const releases = useReleases().data?.releases ?? []
  const { filter } = parseFilter(new URLSearchParams(recipe.filter))
  const isFiltered = filterChips(filter).length > 0
  const parameters = Object.fromEntries(new URLSearchParams(recipe.filter))
  // A revision that is no release can be named by the address of the map; it stays choosable.
  const named = recipe.at !== undefined && !releases.some((release) => release.label === recipe.at) ? [{ id: recipe.at, label: /^\d+$/.test(recipe.at) ? `revision ${recipe.at}` : recipe.at }] : []
  return (
    <>
      <Select
        label="Galaxies as of"
        value={recipe.at ?? NEWEST}
        options={[{ id: NEWEST, label: 'the newest' }, ...releases.map((release) => ({ id: release.label, label: `release ${release.label}` })), ...named]}
        onChange={(at) => onChange({ ...recipe, at: at === NEWEST ? undefined : at })}
        help="With a release named, the figure stays as it is for ever."
      />
      <p>
        <span className="text-muted">{isFiltered ? describeFilter(filter) : 'All galaxies'}. </span>
        <Link to={withQuery(recipe.view === 'sky' ? paths.sky : paths.plane, { ...parameters, at: recipe.at })}>Choose others in the atlas</Link>
      </p>
    </>
  )
}
