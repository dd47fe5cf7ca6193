import { useNavigate, useSearchParams } from 'react-router-dom'
import type { ScaleAnswer } from '../../../core/schema/scale.ts'
import { useScale } from '../../api/scale.ts'
import { useCan } from '../../api/session.ts'
import { useActions } from '../../app/actions/use-actions.ts'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { AnchorSheets } from './anchor-sheets.tsx'
import { HostPolicy } from './host-policy.tsx'
import { MethodTable } from './method-table.tsx'
import { ScaleHistoryList } from './scale-history.tsx'
import { ScaleTree } from './scale-tree.tsx'

/** The scale: anchors, and the policy by which measurements become adopted values; what hangs on each, and how it came to be. */
export default function ScalePage() {
  useDocumentTitle('Scale')
  const navigate = useNavigate()
  const [search] = useSearchParams()
  const at = search.get('at')
  const query = useScale(at)
  // A past scale is read, not worked on.
  const mayPropose = useCan('submission.write') && at === null
  useActions([{ name: 'scale.propose', label: 'Propose a change of the scale', group: 'Scale', when: mayPropose, perform: () => void navigate(paths.proposeScale) }])
  return (
    <div className="page">
      <PageHeader
        title="The scale"
        aside={query.data && `at revision ${query.data.revision} · ${formatCounted(query.data.galaxies, 'galaxy', 'galaxies')} with a distance`}
        intro="Every distance is put on one scale before it is combined: a measurement that assumed another value of its anchor is moved by the difference."
        actions={
          <>
            {at !== null && <Link look="button" to={paths.scale}>The present scale</Link>}
            {mayPropose && <Link look="primary" to={paths.proposeScale}>Propose a change</Link>}
          </>
        }
      />
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />}
      {query.isPending && <Skeleton height={620} />}
      {query.data && <Scale scale={query.data} at={at} mayPropose={mayPropose} />}
    </div>
  )
}

function Scale({ scale, at, mayPropose }: { scale: ScaleAnswer; at: string | null; mayPropose: boolean }) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-6">
      <AnchorSheets scale={scale} mayPropose={mayPropose} />
      <Sheet><ScaleTree scale={scale} /></Sheet>
      <MethodTable scale={scale} />
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-6 lg:grid-cols-[minmax(0,1fr)_24rem]">
        <ScaleHistoryList at={at} />
        <HostPolicy policy={scale.policy} since={scale.policySince} />
      </div>
    </div>
  )
}
