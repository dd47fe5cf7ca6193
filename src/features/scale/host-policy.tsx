import { HOST_FIELDS, HOST_MEANINGS, type HostField } from '../../../core/scale/policy-leaves.ts'
import type { Policy } from '../../../core/scale/policy.ts'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { Measure } from '../../components/measure.tsx'
import { Sheet } from '../../components/sheet.tsx'

/** How hosts are found, and the limit of tension, in words with units. */
export function HostPolicy({ policy, since }: { policy: Policy; since: number }) {
  const fields = Object.keys(HOST_FIELDS) as HostField[]
  return (
    <Sheet title="Hosts and satellites">
      <p className="mb-2 text-muted">Policy in force since revision {since}</p>
      <DefinitionRows
        rows={[
          ...fields.map((field) => ({
            label: HOST_FIELDS[field].label.charAt(0).toUpperCase() + HOST_FIELDS[field].label.slice(1), help: HOST_MEANINGS[field],
            value: <Measure value={policy.host[field]} unit={HOST_FIELDS[field].unit || undefined} decimals={HOST_FIELDS[field].decimals} />,
          })),
          { label: 'Tension', help: 'A measurement farther than this from the adopted value is flagged, never dropped.', value: <Measure value={policy.tension} unit="σ" decimals={1} /> },
        ]}
      />
    </Sheet>
  )
}
