import { useNavigate, useSearchParams } from 'react-router-dom'
import { classLabel } from '../../../core/classes.ts'
import type { HostsAnswer } from '../../../core/schema/catalogue.ts'
import { useHosts } from '../../api/hosts.ts'
import { ClassMark } from '../../components/class-mark.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { Measure, Missing } from '../../components/measure.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

type HostRow = HostsAnswer['hosts'][number]

const COLUMNS: readonly DataColumn<HostRow>[] = [
  { key: 'name', header: 'Host', text: (h) => h.name, render: (h) => <Link to={paths.host(h.slug)}>{h.name}</Link>, sortable: true, width: 180 },
  { key: 'class', header: 'Class', text: (h) => classLabel(h.class), render: (h) => <ClassMark galaxyClass={h.class} withLabel />, sortable: true, width: 140 },
  { key: 'members', header: 'Satellites', text: (h) => h.members, decimals: 0, sortable: true, width: 110 },
  { key: 'distance', header: 'Distance', unit: 'Mpc', text: (h) => h.distance, decimals: 3, sortable: true, width: 110 },
  { key: 'logMstar', header: 'log M★', unit: 'M☉', text: (h) => h.logMstar, decimals: 2, sortable: true, width: 110, help: 'Decimal logarithm of the stellar mass in solar masses' },
  { key: 'sphere', header: 'Sphere', unit: 'kpc', text: (h) => h.sphere, decimals: 0, sortable: true, width: 110, help: 'Radius within which a galaxy counts as a satellite: the policy’s multiple of R200' },
  {
    key: 'dispersion', header: 'Dispersion', unit: 'km/s', text: (h) => h.dispersion, decimals: 0, sortable: true, width: 130, help: 'Line-of-sight velocity dispersion of the satellites by the gapper, error by the jackknife',
    render: (h) => <Measure value={h.dispersion} plus={h.dispersionErr} decimals={0} />,
  },
  { key: 'minorToMajor', header: 'c/a', text: (h) => h.minorToMajor, decimals: 2, sortable: true, width: 90, help: 'Minor-to-major axis of the satellites about the host; from five satellites on' },
  { key: 'brightest', header: 'Brightest satellite', text: (h) => h.brightest?.name ?? null, render: (h) => (h.brightest ? <Link to={paths.galaxy(h.brightest.slug)}>{h.brightest.name}</Link> : <Missing />), sortable: true, width: 180 },
  { key: 'brightestV', header: 'its M_V', unit: 'mag', text: (h) => h.brightest?.absV ?? null, decimals: 1, sortable: true, width: 90 },
]

/** All systems: each host with its satellites counted. */
export default function HostsPage() {
  useDocumentTitle('Hosts')
  const navigate = useNavigate()
  const [search] = useSearchParams()
  const at = search.get('at')
  const query = useHosts(at)
  const hosts = query.data?.hosts
  return (
    <div className="page">
      <PageHeader
        title="Hosts"
        aside={hosts && formatCounted(hosts.length, 'system')}
        intro="A host is a galaxy with at least one satellite: a galaxy whose main disturber it is, with a tidal index above 0, inside the host’s sphere."
      />
      {query.isError ? (
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />
      ) : (
        <DataTable
          label="Hosts"
          columns={COLUMNS}
          rows={hosts ?? []}
          rowKey={(h) => h.slug}
          fileName="hosts"
          isLoading={query.isPending}
          onRowAction={(h) => void navigate(withQuery(paths.host(h.slug), { at }))}
          empty={<EmptyState title="No systems yet">A system appears as soon as two approved distances put a galaxy inside another’s sphere.</EmptyState>}
        />
      )}
    </div>
  )
}
