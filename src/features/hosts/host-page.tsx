import { useMemo, useState } from 'react'
import { useNavigate, useParams, useSearchParams } from 'react-router-dom'
import { classLabel } from '../../../core/classes.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { useHost } from '../../api/hosts.ts'
import { Chip } from '../../components/chip.tsx'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'
import { LuminosityPlot } from './luminosity-plot.tsx'
import { MEMBER_COLUMNS } from './member-columns.tsx'
import type { Pointing } from './member-marks.tsx'
import { ShapeSection } from './shape-section.tsx'
import { SystemFacts } from './system-facts.tsx'
import { SystemPlan } from './system-plan.tsx'
import { VelocityPlot } from './velocity-plot.tsx'

/** One system: the host, its satellites in space, velocity and luminosity, and the shape they make. */
export default function HostPage() {
  const { slug = '' } = useParams()
  const [search] = useSearchParams()
  const at = search.get('at')
  const query = useHost(slug, at)
  useDocumentTitle(query.data ? `${query.data.host.name} system` : 'System')
  if (query.isError) {
    return (
      <div className="page">
        <PageHeader title="System" breadcrumbs={[{ label: 'Hosts', href: paths.hosts }]} />
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />
      </div>
    )
  }
  const answer = query.data
  return (
    <div className="page">
      <PageHeader
        title={answer ? `${answer.host.name} system` : 'System'}
        aside={answer && formatCounted(answer.members.length, 'satellite')}
        breadcrumbs={[{ label: 'Hosts', href: withQuery(paths.hosts, { at }) }]}
        chips={answer && <Chip>{classLabel(answer.host.class)}</Chip>}
        actions={
          <>
            <Link look="button" to={withQuery(paths.galaxy(slug), { at })}>
              The galaxy itself
            </Link>
            <Link look="button" to={withQuery(paths.galaxies, { host: slug, at })}>
              Filter and download
            </Link>
          </>
        }
      />
      {answer ? <System key={answer.host.slug} answer={answer} /> : <Skeleton height={420} />}
    </div>
  )
}

function System({ answer }: { answer: HostAnswer }) {
  const [slug, point] = useState<string | null>(null)
  const pointing = useMemo<Pointing>(() => ({ slug, point }), [slug])
  const { members } = answer
  return (
    <div className="grid gap-5 lg:grid-cols-2">
      <div className="grid min-w-0 items-start gap-5 lg:col-span-2 lg:grid-cols-[minmax(0,1fr)_23rem]">
        <Sheet>
          <SystemPlan answer={answer} pointing={pointing} />
        </Sheet>
        <Sheet title="Where it stands">
          <SystemFacts answer={answer} />
        </Sheet>
      </div>
      {members.length > 0 && (
        <>
          <Sheet className="min-w-0">
            <VelocityPlot answer={answer} pointing={pointing} />
          </Sheet>
          <Sheet className="min-w-0">
            <LuminosityPlot answer={answer} pointing={pointing} />
          </Sheet>
          <div className="min-w-0 lg:col-span-2">
            <ShapeSection answer={answer} />
          </div>
        </>
      )}
      <div className="min-w-0 lg:col-span-2">
        <Satellites answer={answer} pointing={pointing} />
      </div>
    </div>
  )
}

function Satellites({ answer: { host, members }, pointing }: { answer: HostAnswer; pointing: Pointing }) {
  const navigate = useNavigate()
  return (
    <DataTable
      label={`Satellites of ${host.name}`}
      columns={MEMBER_COLUMNS}
      rows={members}
      rowKey={(m) => m.slug}
      selectedKey={pointing.slug}
      onRowHover={(m) => pointing.point(m?.slug ?? null)}
      onRowAction={(m) => void navigate(paths.galaxy(m.slug))}
      fileName={`${host.slug}-satellites`}
      empty={<EmptyState title="No satellites">No galaxy with an approved distance lies inside this galaxy’s sphere.</EmptyState>}
    />
  )
}
