import { measureWords } from '../../../core/formats/measure-words.ts'
import { quantity } from '../../../core/quantities.ts'
import type { MeasurementAnswer } from '../../../core/schema/catalogue.ts'
import { useMeasurements } from '../../api/galaxies.ts'
import { FailedState } from '../../components/failed-state.tsx'
import { GalaxyPicker, type PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Skeleton } from '../../components/skeleton.tsx'

interface Props {
  galaxy: PickedGalaxy | null
  onGalaxy: (galaxy: PickedGalaxy | null) => void
  value: number | null
  onChange: (measurement: MeasurementAnswer) => void
  error?: string
  /** Offers those alone that are excluded, or that are not. */
  excluded?: boolean
}

/** "Distance modulus 26.37 ± 0.05 mag, Gieren et al. 2005" */
function words(m: MeasurementAnswer): string {
  const published = m.published ? measureWords(m.published) : measureWords({ ...m, unit: quantity(m.quantity).unit })
  return `${quantity(m.quantity).label} ${published}`
}

/** Chooses one measurement that the catalogue holds: first the galaxy, then the value. */
export function MeasurementPicker({ galaxy, onGalaxy, value, onChange, error, excluded }: Props) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <GalaxyPicker value={galaxy} onChange={onGalaxy} autoFocus={!galaxy} />
      {galaxy && <Choices slug={galaxy.slug} value={value} onChange={onChange} error={error} excluded={excluded} />}
    </div>
  )
}

function Choices({ slug, value, onChange, error, excluded }: { slug: string } & Pick<Props, 'value' | 'onChange' | 'error' | 'excluded'>) {
  const query = useMeasurements(slug)
  if (query.isError) return <FailedState error={query.error} onRetry={() => void query.refetch()} />
  if (!query.data) return <Skeleton lines={4} />
  const measurements = query.data.measurements.filter((m) => excluded === undefined || excluded === (m.excludedReason !== null))
  if (measurements.length === 0) return <p className="text-muted">{excluded ? 'No measurement of this galaxy is excluded.' : 'The catalogue holds no measurement of this galaxy that could be chosen.'}</p>
  return (
    <div>
      <RadioGroup
        label="Measurement"
        options={measurements.map((m) => ({ id: String(m.id), label: words(m), help: [m.source.label, m.locator, m.excludedReason && `excluded: ${m.excludedReason}`].filter(Boolean).join(' · ') }))}
        value={value === null ? '' : String(value)}
        onChange={(id) => {
          const chosen = measurements.find((m) => String(m.id) === id)
          if (chosen) onChange(chosen)
        }}
      />
      {error && <p className="mt-1 text-sm text-stop">{error}</p>}
    </div>
  )
}
