import { LocateFixed } from 'lucide-react'
import { classLabel } from '../../../core/classes.ts'
import type { GalaxyAnswer } from '../../../core/schema/catalogue.ts'
import { useGalaxy } from '../../api/galaxies.ts'
import { Button } from '../../components/button.tsx'
import { ClassMark } from '../../components/class-mark.tsx'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { formatCounted, formatNumber } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

export interface SelectionCardProps {
  slug: string | null
  at: string | null
  /** Draws the plane about the galaxy. */
  onCentre?: (slug: string) => void
}

/** Height of what comes, px, so that nothing below moves. */
const HEIGHT = 250

/** The galaxy that is chosen on the map. */
export function SelectionCard({ slug, at, onCentre }: SelectionCardProps) {
  if (slug === null) {
    return (
      <Sheet title="A galaxy">
        <p className="text-muted">Choose one on the map by a click, or walk there: Tab to the map, then the arrow keys.</p>
      </Sheet>
    )
  }
  return <Chosen slug={slug} at={at} onCentre={onCentre} />
}

function Chosen({ slug, at, onCentre }: { slug: string; at: string | null; onCentre?: (slug: string) => void }) {
  const query = useGalaxy(slug, at)
  const galaxy = query.data
  if (query.isError) return <FailedState error={query.error} title="This galaxy cannot be read" onRetry={() => void query.refetch()} />
  if (!galaxy) {
    return (
      <Sheet>
        <Skeleton height={HEIGHT} />
      </Sheet>
    )
  }
  return (
    <Sheet
      title={
        <Link look="quiet" to={withQuery(paths.galaxy(galaxy.slug), { at })}>
          {galaxy.designation}
        </Link>
      }
      actions={
        onCentre &&
        number(galaxy, 'sgx') !== null && (
          <Button size="small" icon={<LocateFixed size={14} aria-hidden />} onPress={() => onCentre(galaxy.slug)}>
            Centre here
          </Button>
        )
      }
    >
      <p className="flex flex-wrap items-center gap-x-1.5 text-muted">
        <ClassMark galaxyClass={galaxy.class} />
        {[classLabel(galaxy.class), relationWords(galaxy)].join(' · ')}
      </p>
      <p className="mt-2">
        <Measure value={number(galaxy, 'distance')} plus={gap(galaxy, 'distance_hi', 'distance')} minus={gap(galaxy, 'distance', 'distance_lo')} unit="Mpc" decimals={2} size="large" stacked />
      </p>
      <p className="mb-3 text-sm text-muted">{galaxy.adopted.find((one) => one.quantity === 'distance_modulus')?.sentence}</p>
      <DefinitionRows rows={rowsOf(galaxy)} />
    </Sheet>
  )
}

function number(galaxy: GalaxyAnswer, column: string): number | null {
  const value = galaxy.row[column]
  return typeof value === 'number' ? value : null
}

function gap(galaxy: GalaxyAnswer, upper: string, lower: string): number | null {
  const [hi, lo] = [number(galaxy, upper), number(galaxy, lower)]
  return hi === null || lo === null ? null : Math.max(0, hi - lo)
}

function relationWords({ host, satellites }: GalaxyAnswer): string {
  if (satellites > 0) return `host of ${formatCounted(satellites, 'satellite')}`
  return host ? `satellite of ${host.name}` : 'in the field'
}

function rowsOf(galaxy: GalaxyAnswer) {
  const place = ['sgx', 'sgy', 'sgz'].map((key) => number(galaxy, key))
  return [
    { label: 'SGX, SGY, SGZ', value: place.includes(null) ? <Measure value={null} /> : place.map((value) => formatNumber(value, 2)).join(', ') },
    { label: <>M<sub>V</sub></>, value: <Measure value={number(galaxy, 'abs_v')} decimals={1} /> },
    { label: 'Tidal index', value: <Measure value={number(galaxy, 'tidal_index')} decimals={1} /> },
  ]
}
