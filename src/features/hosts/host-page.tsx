import { useNavigate, useParams, useSearchParams } from 'react-router-dom'
import { classLabel } from '../../../core/classes.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { useHost } from '../../api/hosts.ts'
import { Chip } from '../../components/chip.tsx'
import { DataTable } from '../../components/data-table.tsx'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'
import { MEMBER_COLUMNS } from './member-columns.tsx'
import { SystemPlan } from './system-plan.tsx'

/** One system: the host, its satellites in three dimensions, and where each stands. */
export default function HostPage() {
  const { slug = '' } = useParams()
  const [search] = useSearchParams()
  const at = search.get('at')
  const query = useHost(slug, at)
  const navigate = useNavigate()
  useDocumentTitle(query.data ? `${query.data.host.name} system` : 'System')
  if (query.isError) {
    return (
      <div className="page">
        <PageHeader title="System" breadcrumbs={[{ label: 'Hosts', href: paths.hosts }]} />
        <FailedState error={query.error} onRetry={() => void query.refetch()} />
      </div>
    )
  }
  const answer = query.data
  return (
    <div className="page">
      <PageHeader
        title={answer ? `${answer.host.name} system` : 'System'}
        aside={answer && formatCounted(answer.members.length, 'satellite')}
        breadcrumbs={[{ label: 'Hosts', href: paths.hosts }]}
        chips={answer && <Chip>{classLabel(answer.host.class)}</Chip>}
        actions={
          <Link look="button" to={withQuery(paths.galaxies, { host: slug, at })}>
            Filter and download
          </Link>
        }
      />
      {answer ? (
        <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_22rem]">
          <SystemPlan answer={answer} />
          <Sheet title="Where it stands">
            <DefinitionRows rows={facts(answer)} />
            <p className="mt-4">
              <Link to={paths.galaxy(slug)}>The galaxy itself</Link>
            </p>
          </Sheet>
          <div className="min-w-0 lg:col-span-2">
            <DataTable
              label={`Satellites of ${answer.host.name}`}
              columns={MEMBER_COLUMNS}
              rows={answer.members}
              rowKey={(m) => m.slug}
              onRowAction={(m) => void navigate(paths.galaxy(m.slug))}
              empty={<EmptyState title="No satellites">No galaxy with an approved distance lies inside this galaxy’s sphere.</EmptyState>}
            />
          </div>
        </div>
      ) : (
        <Skeleton height={420} />
      )}
    </div>
  )
}

function facts({ host }: HostAnswer) {
  return [
    { label: 'Distance', value: <Measure value={host.distance} unit="Mpc" decimals={2} /> },
    { label: 'Stellar mass, log', value: <Measure value={host.logMstar} unit="M☉" decimals={2} /> },
    { label: <>M<sub>V</sub></>, value: <Measure value={host.absV} unit="mag" decimals={1} /> },
    { label: <>R<sub>200</sub></>, value: <Measure value={host.r200} unit="kpc" decimals={0} /> },
    { label: 'Sphere', help: 'inside it a galaxy can be a satellite', value: <Measure value={host.sphere} unit="kpc" decimals={0} /> },
    { label: 'Zero-velocity radius', value: <Measure value={host.zeroVelocityRadius} unit="kpc" decimals={0} /> },
    { label: 'Velocity dispersion', help: 'of the satellites, gapper', value: <Measure value={host.dispersion} unit="km/s" decimals={0} /> },
    { label: <>v<sub>GSR</sub></>, value: <Measure value={host.vGsr} unit="km/s" decimals={0} /> },
  ]
}
