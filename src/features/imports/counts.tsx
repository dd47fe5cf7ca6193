import type { ImportAnswer } from '../../../core/schema/imports.ts'
import { StateShape, type BadgeShape } from '../../components/badge.tsx'
import { classNames } from '../../lib/class-names.ts'
import { formatCount } from '../../lib/format.ts'

/** How the table reads so far, in six numbers. */
export function Counts({ held, isReading }: { held: ImportAnswer; isReading: boolean }) {
  const facts: readonly { label: string; value: number; look?: string; shape?: BadgeShape }[] = [
    { label: 'rows', value: held.rows },
    { label: 'in order', value: held.rowsOk, look: 'text-good', shape: 'tick' },
    { label: 'to mend', value: held.rowsBad, look: held.rowsBad > 0 ? 'text-caution' : 'text-muted', shape: 'mark' },
    { label: 'left out', value: held.rowsLeftOut },
    { label: 'new galaxies', value: held.newGalaxies },
    { label: 'new sources', value: held.newSources },
  ]
  return (
    <dl aria-busy={isReading} className={classNames('mb-5 grid grid-cols-3 gap-px overflow-hidden rounded-lg border border-line bg-line sm:grid-cols-6', isReading && 'opacity-70')}>
      {facts.map((f) => (
        <div key={f.label} className="flex flex-col-reverse bg-sheet px-4 py-3">
          <dt className="text-sm text-muted">{f.label}</dt>
          <dd className={classNames('figures flex items-center gap-1.5 font-serif text-xl', f.look)}>
            {formatCount(f.value)}
            {f.shape && <StateShape shape={f.shape} />}
          </dd>
        </div>
      ))}
    </dl>
  )
}
