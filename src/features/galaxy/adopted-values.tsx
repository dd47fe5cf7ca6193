import { QUANTITY_KEYS, quantity } from '../../../core/quantities.ts'
import type { AdoptedAnswer, GalaxyAnswer, MeasurementAnswer, Reason } from '../../../core/schema/catalogue.ts'
import { Badge } from '../../components/badge.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { Link } from '../../components/link.tsx'
import { Measure, Missing } from '../../components/measure.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { formatNumber, formatPercent, formatSigned } from '../../lib/format.ts'
import { publishedWords } from '../../lib/published.ts'
import { paths } from '../../paths.ts'
import { adoptedOf, quantityLook } from './adopted-words.ts'
import { Comparison } from './comparison.tsx'
import { Fold } from './fold.tsx'
import { OverrideLinks } from './override-links.tsx'

export interface AdoptedValuesProps {
  galaxy: GalaxyAnswer
  measurements: readonly MeasurementAnswer[]
  /** The release or revision that is read; null for the newest. */
  at: string | null
  /** With the ways to override. */
  canWrite: boolean
}

/** What the catalogue adopts of every quantity; each opens to what each measurement weighed and why. */
export function AdoptedValues({ galaxy, measurements, at, canWrite }: AdoptedValuesProps) {
  const adopted = QUANTITY_KEYS.map((key) => adoptedOf(galaxy, key)).filter((one) => one !== undefined)
  return (
    <Sheet title="Adopted values">
      {adopted.length === 0 ? (
        <EmptyState title="Nothing adopted yet">What the policy makes of the approved measurements will stand here, each with its reasons.</EmptyState>
      ) : (
        <div className="border-t border-line">
          {adopted.map((one) => (
            <Fold key={one.quantity} summary={<Summary adopted={one} />}>
              {() => (
                <>
                  <Reasons adopted={one} measurements={measurements} />
                  {one.quantity === 'distance_modulus' && <div className="mt-4"><Comparison adopted={one} measurements={measurements} at={at} /></div>}
                  {canWrite && <p className="mt-3"><OverrideLinks galaxy={galaxy} about={one.quantity} isOverridden={one.override !== null} /></p>}
                </>
              )}
            </Fold>
          ))}
        </div>
      )}
    </Sheet>
  )
}

function Summary({ adopted }: { adopted: AdoptedAnswer }) {
  const { decimals, unit } = quantityLook(adopted.quantity)
  const tension = adopted.reasons.some((reason) => reason.used && reason.tension)
  return (
    <>
      <span>{quantity(adopted.quantity).label}</span>
      <span className="flex flex-wrap items-baseline justify-end gap-x-4">
        {tension && <Badge tone="caution" shape="mark">tension</Badge>}
        {adopted.override !== null && <Badge tone="accent" shape="ring">override</Badge>}
        {adopted.textValue ?? <Measure value={adopted.value} plus={adopted.errPlus} minus={adopted.errMinus} unit={unit} decimals={decimals} />}
        <span className="figures w-20 text-right text-muted">{`${adopted.nUsed} of ${adopted.nAll} used`}</span>
      </span>
    </>
  )
}

type ReasonRow = Reason & { measurement: MeasurementAnswer | undefined }

function Reasons({ adopted, measurements }: { adopted: AdoptedAnswer; measurements: readonly MeasurementAnswer[] }) {
  const rows: ReasonRow[] = adopted.reasons.map((reason) => ({ ...reason, measurement: measurements.find((m) => m.id === reason.measurementId) }))
  const { decimals, unit } = quantityLook(adopted.quantity)
  return (
    <div className="grid gap-3">
      <p className="prose-measure">{adopted.sentence}</p>
      {adopted.override !== null && <p className="prose-measure text-muted">{`Decided against the policy: ${adopted.override}`}</p>}
      {adopted.errSys !== null && <p className="text-muted">{`Systematic error ${formatNumber(adopted.errSys, decimals)} ${unit ?? ''}${scatterWords(adopted, decimals, unit)}.`}</p>}
      <DataTable label={`${quantity(adopted.quantity).label}: reasons`} columns={reasonColumns(adopted.quantity)} rows={rows} rowKey={(row) => String(row.measurementId)} showTools={false} />
    </div>
  )
}

function scatterWords({ scatter, chi2, dof }: AdoptedAnswer, decimals: number, unit: string | undefined): string {
  const spread = scatter ? `, scatter beyond the errors ${formatNumber(scatter, decimals)} ${unit ?? ''}` : ''
  return chi2 !== null && dof ? `${spread}; χ² = ${formatNumber(chi2, 1)} for ${dof} degrees of freedom` : spread
}

function reasonColumns(key: AdoptedAnswer['quantity']): DataColumn<ReasonRow>[] {
  const { decimals, unit } = quantityLook(key)
  const isText = quantity(key).kind === 'text'
  const numbers: DataColumn<ReasonRow>[] = [
    { key: 'scaled', header: 'On the scale', unit, text: (r) => r.scaled, decimals, sortable: true, width: 150, help: 'The value on the catalogue’s scale, with the error that entered', render: (r) => <Measure value={r.scaled} plus={r.error} minus={r.error} decimals={decimals} /> },
    { key: 'shift', header: 'Shift', unit, text: (r) => r.shift, decimals, width: 100, help: 'What the scale added to the published value', render: (r) => (r.shift === 0 ? '0' : formatSigned(r.shift, decimals)) },
    { key: 'residual', header: 'Residual', unit: 'σ', text: (r) => r.residual, decimals: 1, sortable: true, width: 110, help: 'Distance from the adopted value in units of the error', render: (r) => <Residual row={r} /> },
  ]
  return [
    { key: 'source', header: 'Source', text: (r) => r.measurement?.source.label ?? null, sortable: true, width: 190, render: (r) => (r.measurement ? <Link look="quiet" to={paths.source(r.measurement.source.id)}>{r.measurement.source.label}</Link> : <Missing />) },
    { key: 'published', header: 'Published', text: (r) => (r.measurement ? publishedWords(r.measurement) : null), width: 170 },
    { key: 'weight', header: 'Weight', text: (r) => r.weight, decimals: 2, sortable: true, width: 90, render: (r) => (r.used ? formatPercent(r.weight) : <Missing />) },
    ...(isText ? [] : numbers),
    { key: 'reason', header: 'Reason', text: (r) => r.reason, width: 200 },
    { key: 'flags', header: 'Flags', text: (r) => r.flags.join(', ') || null, width: 150 },
  ]
}

function Residual({ row: { residual, tension } }: { row: ReasonRow }) {
  if (residual === null) return <Missing />
  return tension ? <span className="font-semibold text-caution">{`${formatSigned(residual, 1)} tension`}</span> : formatSigned(residual, 1)
}
