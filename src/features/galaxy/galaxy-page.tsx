import { useNavigate, Navigate, useParams, useSearchParams } from 'react-router-dom'
import { classLabel } from '../../../core/classes.ts'
import type { GalaxyAnswer } from '../../../core/schema/catalogue.ts'
import { ApiProblem } from '../../api/client.ts'
import { useGalaxy, useMeasurements } from '../../api/galaxies.ts'
import { useCan } from '../../api/session.ts'
import { useActions } from '../../app/actions/use-actions.ts'
import { StatusBadge } from '../../components/badge.tsx'
import { Chip } from '../../components/chip.tsx'
import { ClassMark } from '../../components/class-mark.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { SectionHeading } from '../../components/section-heading.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { SkyCoordinate } from '../../components/sky-coordinate.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted, formatNumber } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'
import { AdoptedValues } from './adopted-values.tsx'
import { rowNumber } from './adopted-words.ts'
import { GalaxyHistory, Names, Neighbours } from './around.tsx'
import { changeAddress } from './change-links.ts'
import { DistancePlot } from './distance-plot.tsx'
import { MeasurementTable } from './measurement-table.tsx'
import { MissingGalaxy } from './missing-galaxy.tsx'
import { PossibleHosts } from './possible-hosts.tsx'
import { AdoptedDistance, Standing } from './standing.tsx'

/** One galaxy: what is adopted of it and why, every measurement, where it stands. */
export default function GalaxyPage() {
  const { slug = '' } = useParams()
  const [search] = useSearchParams()
  const at = search.get('at')
  const query = useGalaxy(slug, at)
  const galaxy = query.data
  useDocumentTitle(galaxy?.designation ?? 'Galaxy')
  if (query.error instanceof ApiProblem && query.error.status === 404) return <MissingGalaxy slug={slug} at={at} detail={query.error.detail} />
  // An earlier identifier leads on to the present one.
  if (galaxy && galaxy.slug !== slug) return <Navigate replace to={withQuery(paths.galaxy(galaxy.slug), { at })} />
  if (galaxy) return <Galaxy key={galaxy.slug} galaxy={galaxy} at={at} />
  return (
    <div className="page">
      <PageHeader title="Galaxy" breadcrumbs={[{ label: 'Galaxies', href: paths.galaxies }]} />
      {query.isError ? (
        <FailedState error={query.error} onRetry={() => void query.refetch()} />
      ) : (
        <div className="grid gap-5 lg:grid-cols-[minmax(0,1fr)_24rem]">
          <Skeleton height={480} />
          <Skeleton height={480} />
        </div>
      )}
    </div>
  )
}

function Galaxy({ galaxy, at }: { galaxy: GalaxyAnswer; at: string | null }) {
  const navigate = useNavigate()
  const measurements = useMeasurements(galaxy.slug, at)
  // A past state is read, not worked on.
  const canWrite = useCan('submission.write') && at === null
  const mayReadAny = useCan('catalogue.read-current')
  useActions([
    { name: 'galaxy.add-measurement', label: `Add a measurement of ${galaxy.designation}`, group: 'Galaxy', when: canWrite, perform: () => void navigate(changeAddress(galaxy, 'measurement.add')) },
    { name: 'galaxy.amend', label: `Amend ${galaxy.designation}`, group: 'Galaxy', when: canWrite, perform: () => void navigate(changeAddress(galaxy, 'galaxy.amend')) },
  ])
  const held = measurements.data?.measurements
  return (
    <div className="page">
      <PageHeader
        title={galaxy.designation}
        breadcrumbs={[{ label: 'Galaxies', href: withQuery(paths.galaxies, { at }) }, ...(galaxy.host ? [{ label: `${galaxy.host.name} system`, href: withQuery(paths.host(galaxy.host.slug), { at }) }] : [])]}
        chips={<Facts galaxy={galaxy} at={at} />}
        actions={
          <>
            <Link look="button" to={withQuery(paths.sky, { galaxy: galaxy.slug, at })}>On the sky</Link>
            {canWrite && <Link look="button" to={changeAddress(galaxy, 'galaxy.amend')}>Amend</Link>}
            {canWrite && <Link look="primary" to={changeAddress(galaxy, 'measurement.add')}>Add a measurement</Link>}
          </>
        }
      />
      {at !== null && (
        <p className="mb-4">
          {`As of ${/^\d+$/.test(at) ? 'revision' : 'release'} ${at}. `}
          <Link to={paths.galaxy(galaxy.slug)}>Read the newest</Link>
        </p>
      )}
      {galaxy.note && <p className="prose-measure mb-4 font-serif text-base">{galaxy.note}</p>}
      <div className="grid gap-5 lg:grid-cols-[minmax(0,1fr)_24rem]">
        <div className="grid min-w-0 content-start gap-5">
          {measurements.isError ? (
            <FailedState error={measurements.error} onRetry={() => void measurements.refetch()} title="The measurements cannot be read just now" />
          ) : held ? (
            <>
              <DistancePlot galaxy={galaxy} measurements={held} />
              <AdoptedValues galaxy={galaxy} measurements={held} at={at} canWrite={canWrite} />
            </>
          ) : (
            <Skeleton height={640} label="Loading the measurements" />
          )}
        </div>
        <div className="grid min-w-0 content-start gap-5">
          <AdoptedDistance galaxy={galaxy} />
          <Standing galaxy={galaxy} at={at} canWrite={canWrite} />
          <PossibleHosts galaxy={galaxy} at={at} />
        </div>
        <div className="min-w-0 lg:col-span-2">
          <SectionHeading>Measurements</SectionHeading>
          {held ? <MeasurementTable galaxy={galaxy} measurements={held} at={at} canWrite={canWrite} /> : <Skeleton height={320} />}
        </div>
        <div className="grid min-w-0 items-start gap-5 md:grid-cols-3 lg:col-span-2">
          <Names galaxy={galaxy} />
          <Neighbours slug={galaxy.slug} at={at} />
          <GalaxyHistory slug={galaxy.slug} mayReadAny={mayReadAny} />
        </div>
      </div>
    </div>
  )
}

function Facts({ galaxy, at }: { galaxy: GalaxyAnswer; at: string | null }) {
  const probability = rowNumber(galaxy, 'host_probability')
  const { host, satellites } = galaxy
  const chance = probability === null ? '' : `, probability ${formatNumber(probability, 2)}`
  return (
    <>
      {galaxy.status !== 'confirmed' && <StatusBadge status={galaxy.status} />}
      <Chip icon={<span aria-hidden className="flex"><ClassMark galaxyClass={galaxy.class} /></span>}>{classLabel(galaxy.class)}</Chip>
      {host && (
        <Chip>
          <span>
            satellite of <Link to={withQuery(paths.host(host.slug), { at })}>{host.name}</Link>
            {chance}
          </span>
        </Chip>
      )}
      {satellites > 0 && (
        <Chip>
          <span>
            host of <Link to={withQuery(paths.host(galaxy.slug), { at })}>{formatCounted(satellites, 'satellite')}</Link>
          </span>
        </Chip>
      )}
      {!host && satellites === 0 && <Chip>in the field</Chip>}
      <SkyCoordinate ra={galaxy.ra} dec={galaxy.dec} />
    </>
  )
}
