import { useSearchParams } from 'react-router-dom'
import { method } from '../../../core/methods.ts'
import { policySchema, type MethodPolicy, type Policy } from '../../../core/scale/policy.ts'
import type { ScaleAnswer } from '../../../core/schema/scale.ts'
import { useScale } from '../../api/scale.ts'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Measure } from '../../components/measure.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { SectionHeading } from '../../components/section-heading.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'

type Anchor = ScaleAnswer['anchors'][number]

const ANCHOR_COLUMNS: readonly DataColumn<Anchor>[] = [
  { key: 'label', header: 'Anchor', text: (a) => a.label, width: 220, sortable: true },
  { key: 'value', header: 'Adopted', unit: 'mag', text: (a) => a.value, decimals: 3, width: 160, render: (a) => <Measure value={a.value} plus={a.err} decimals={3} /> },
  { key: 'methods', header: 'Methods that hang on it', text: (a) => a.methods.map((m) => method(m).label).join(', '), width: 260 },
  { key: 'measurements', header: 'Measurements', text: (a) => a.measurements, decimals: 0, width: 130, sortable: true },
  { key: 'source', header: 'Source', text: (a) => a.source, width: 280 },
]

const METHOD_COLUMNS: readonly DataColumn<MethodPolicy>[] = [
  { key: 'method', header: 'Method', text: (m) => method(m.method).label, sortable: true, width: 260 },
  { key: 'tier', header: 'Tier', text: (m) => m.tier, decimals: 0, sortable: true, width: 80, help: 'The best tier present decides; lower tiers are shown and not used' },
  { key: 'systematic', header: 'Systematic', unit: 'mag', text: (m) => m.systematic, decimals: 2, sortable: true, width: 110, help: 'Systematic error of the method on the catalogue’s scale' },
  { key: 'unscaled', header: 'Scale unknown', unit: 'mag', text: (m) => m.unscaled, decimals: 2, sortable: true, width: 130, help: 'Added in quadrature when the authors do not state the anchor value they assumed' },
  { key: 'defaultError', header: 'Error if none', unit: 'mag', text: (m) => m.defaultError, decimals: 2, sortable: true, width: 130, help: 'Stands in for a missing error bar' },
]

/** The scale: anchors, and the policy by which measurements become adopted values. */
export default function ScalePage() {
  useDocumentTitle('Scale')
  const [search] = useSearchParams()
  const query = useScale(search.get('at'))
  const policy = query.data ? policySchema.safeParse(query.data.policy) : null
  return (
    <div className="page">
      <PageHeader title="The scale" aside={query.data && `revision ${query.data.revision}`} intro="Every distance is put on one scale before it is combined: a measurement that assumed another value of its anchor is moved by the difference." />
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />}
      {query.isPending && <Skeleton height={420} />}
      {query.data && (
        <>
          <SectionHeading note={formatCounted(query.data.anchors.length, 'anchor')}>Anchors</SectionHeading>
          <DataTable label="Anchors" columns={ANCHOR_COLUMNS} rows={query.data.anchors} rowKey={(a) => a.key} showTools={false} />
          {policy?.success ? <PolicyView policy={policy.data} /> : <FailedState error={policy?.error} title="The policy document cannot be read" safe="The catalogue itself is unharmed." />}
        </>
      )}
    </div>
  )
}

function PolicyView({ policy }: { policy: Policy }) {
  const { host } = policy
  return (
    <div className="mt-8 grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_24rem]">
      <div className="min-w-0">
        <SectionHeading note={policy.name}>Methods</SectionHeading>
        <DataTable label="Methods by tier" columns={METHOD_COLUMNS} rows={policy.methods} rowKey={(m) => m.method} showTools={false} maxHeight="none" />
      </div>
      <Sheet title="Hosts and satellites">
        <DefinitionRows
          rows={[
            { label: 'Least mass ratio', help: 'a host outweighs its satellite by this, in stars', value: <Measure value={host.massRatio} decimals={1} /> },
            { label: 'Sphere', help: 'in units of R200', value: <Measure value={host.sphere} decimals={2} /> },
            { label: 'Total over stellar mass', value: <Measure value={host.totalOverStellar} decimals={1} /> },
            { label: 'Hubble constant', help: 'for R200', value: <Measure value={host.hubble} unit="km/s/Mpc" decimals={1} /> },
            { label: 'Draws', help: 'for membership probabilities', value: <Measure value={host.draws} decimals={0} /> },
            { label: 'Tension', help: 'flagged above this residual', value: <Measure value={policy.tension} unit="σ" decimals={1} /> },
          ]}
        />
      </Sheet>
    </div>
  )
}
