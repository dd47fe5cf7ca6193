import { compareEstimators } from '../../../core/adoption/compare.ts'
import type { AdoptedAnswer, MeasurementAnswer } from '../../../core/schema/catalogue.ts'
import { useScale } from '../../api/scale.ts'
import { Measure } from '../../components/measure.tsx'
import { ScrollAcross } from '../../components/scroll-across.tsx'
import { formatSigned } from '../../lib/format.ts'

/** What other estimators would make of the values that the distance was adopted from. */
export function Comparison({ adopted, measurements, at }: { adopted: AdoptedAnswer; measurements: readonly MeasurementAnswer[]; at: string | null }) {
  const policy = useScale(at).data?.policy
  if (!policy || adopted.value === null) return null
  const estimates = compareEstimators(adopted.reasons, (id) => measurements.find((m) => m.id === id)?.method ?? null, policy)
  if (estimates.length === 0) return null
  const { value } = adopted
  return (
    <div>
      <h3 className="mb-1 font-semibold">For comparison</h3>
      <p className="mb-2 text-sm text-muted">The same values by other estimators. The catalogue stands behind the adopted one.</p>
      <ScrollAcross label="Other estimators">
        <table className="figures w-full border-collapse text-sm">
          <thead className="text-left text-muted">
            <tr className="border-b border-line">
              <th scope="col" className="py-1.5 pr-3 font-semibold">estimator</th>
              <th scope="col" className="px-3 py-1.5 text-right font-semibold">μ / mag</th>
              <th scope="col" className="px-3 py-1.5 text-right font-semibold">less the adopted</th>
              <th scope="col" className="py-1.5 pl-3 font-semibold">error</th>
            </tr>
          </thead>
          <tbody>
            {estimates.map((e) => (
              <tr key={e.key} className="border-b border-line align-top">
                <th scope="row" className="py-1.5 pr-3 text-left font-normal">{e.label}</th>
                <td className="px-3 py-1.5 text-right whitespace-nowrap"><Measure value={e.value} plus={e.error} minus={e.error} decimals={3} /></td>
                <td className="px-3 py-1.5 text-right">{formatSigned(e.value - value, 3)}</td>
                <td className="py-1.5 pl-3 text-muted">{e.note}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollAcross>
    </div>
  )
}
