import { method } from '../../../core/methods.ts'
import { anchorKindWords } from '../../../core/scale/anchor-fields.ts'
import type { ScaleAnchor, ScaleAnswer } from '../../../core/schema/scale.ts'
import { Chip } from '../../components/chip.tsx'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { formatCount } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

/** The anchors, each with what hangs on it. */
export function AnchorSheets({ scale, mayPropose }: { scale: ScaleAnswer; mayPropose: boolean }) {
  if (scale.anchors.length === 0) return <EmptyState title="No anchors yet">The reference values that distance methods hang on will stand here. Without one, every distance is taken as it was published.</EmptyState>
  return (
    <ul aria-label="Anchors" className="grid grid-cols-[minmax(0,1fr)] gap-6 md:grid-cols-2">
      {scale.anchors.map((a) => (
        <Sheet
          key={a.key}
          as="li"
          title={a.label}
          actions={mayPropose && <Link to={withQuery(paths.proposeScale, { anchor: a.key })} aria-label={`Propose another value of ${a.label}`}>Propose another value</Link>}
        >
          <p><Measure value={a.value} plus={a.err} unit="mag" decimals={3} size="large" /></p>
          <p className="mt-1 text-muted">{anchorKindWords(a.kind)} · {a.source} · since revision {a.since}</p>
          <p className="mt-3 flex flex-wrap gap-1.5">{a.methods.map((key) => <Chip key={key}>{method(key).label}</Chip>)}</p>
          <div className="mt-3"><DefinitionRows rows={hanging(a)} /></div>
        </Sheet>
      ))}
    </ul>
  )
}

function hanging(a: ScaleAnchor) {
  return [
    { label: 'Measurements that state which value they assumed', help: 'moved by the difference', value: formatCount(a.measurements) },
    { label: 'Measurements by its methods that state none', help: 'scale unknown: taken as published, with a larger error', value: formatCount(a.unscaled) },
    { label: 'Galaxies whose adopted distance hangs on it', value: <strong className="font-semibold">{formatCount(a.galaxies)}</strong> },
  ]
}
