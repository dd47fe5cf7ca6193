import { useState } from 'react'
import type { Effect } from '../../../core/schema/submissions.ts'
import { formatCounted, formatSigned } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { Button } from '../button.tsx'
import { Link } from '../link.tsx'
import { Missing } from '../measure.tsx'
import { ScrollAcross } from '../scroll-across.tsx'
import { ShiftsView } from './shifts/shifts-view.tsx'
import { arrivalWords, effectSentence, isFirst, namesIn, shiftWords, valueWords, type Moved, type MovedGalaxy } from './effect-words.ts'

/** So many galaxies are listed at a time. */
const LISTED = 40
/** Below the picture and the table of what moves. */
const FEW_LISTED = 10

/** From so many shifts on, a picture tells more than the list. */
const MANY_SHIFTS = 6

interface EffectViewProps {
  effect: Effect
  /** A change of the scale is looked at as a whole, however few galaxies it moves. */
  ofScale?: boolean
}

/** What approving would do: the whole catalogue moving, where it does, and every adopted and derived value that would differ, before beside after. */
export function EffectView({ effect, ofScale = false }: EffectViewProps) {
  if (effect.galaxies.length === 0 && effect.systems.length === 0) {
    return <p className="text-muted">No adopted or derived value would change.</p>
  }
  const moving = effect.shifts.length >= (ofScale ? 1 : MANY_SHIFTS)
  return (
    <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-8">
      {moving && <ShiftsView effect={effect} />}
      <section className="min-w-0">
        {moving && <h3 className="mb-2 text-base">Everything that would differ</h3>}
        <ValueByValue effect={effect} first={moving ? FEW_LISTED : LISTED} />
      </section>
    </div>
  )
}

function ValueByValue({ effect, first }: { effect: Effect; first: number }) {
  const [listed, setListed] = useState(first)
  const names = namesIn(effect)
  const rest = effect.galaxies.length - listed
  const told = effect.galaxies.length
  const changed = effect.counts.galaxiesAdded + effect.counts.galaxiesChanged
  return (
    <div>
      <p className="mb-3">
        {effectSentence(effect.counts)}
        {told < changed && <span className="text-muted">{` The ${formatCounted(told, 'galaxy', 'galaxies')} that change most are listed.`}</span>}
      </p>
      <ScrollAcross label="Effect, value by value">
        <table className="w-full border-collapse figures">
          <thead className="text-left text-sm text-muted">
            <tr className="border-b border-line">
              <th scope="col" className="py-1.5 pr-3 font-semibold">galaxy</th>
              <th scope="col" className="px-3 py-1.5 font-semibold">value</th>
              <th scope="col" className="px-3 py-1.5 text-right font-semibold">before</th>
              <th scope="col" className="px-3 py-1.5 text-right font-semibold">after</th>
              <th scope="col" className="py-1.5 pl-3 text-right font-semibold">shift</th>
            </tr>
          </thead>
          {effect.systems.length > 0 && (
            <tbody>
              {effect.systems.map((s) => (
                <tr key={s.slug} className="border-b border-line align-top">
                  <th scope="row" className="py-1.5 pr-3 text-left font-normal whitespace-nowrap">{s.name} system</th>
                  <td className="px-3 py-1.5 text-muted">
                    satellites
                    <span className="block text-sm">
                      {s.gained.length > 0 && `gains ${listOf(s.gained)}`}
                      {s.gained.length > 0 && s.lost.length > 0 && '; '}
                      {s.lost.length > 0 && `loses ${listOf(s.lost)}`}
                    </span>
                  </td>
                  <td className="px-3 py-1.5 text-right"><del className="text-muted">{s.before}</del></td>
                  <td className="px-3 py-1.5 text-right font-semibold">{s.after}</td>
                  <td className="py-1.5 pl-3 text-right">{formatSigned(s.after - s.before, 0)}</td>
                </tr>
              ))}
            </tbody>
          )}
          {effect.galaxies.slice(0, listed).map((g) => (g.kind === 'added' ? <Arrival key={g.slug} galaxy={g} names={names} /> : <Moves key={g.slug} galaxy={g} names={names} />))}
        </table>
      </ScrollAcross>
      {rest > 0 && (
        <div className="mt-3">
          <Button size="small" onPress={() => setListed(listed + 5 * LISTED)}>Show {formatCounted(Math.min(rest, 5 * LISTED), 'more galaxy', 'more galaxies')}</Button>
        </div>
      )}
    </div>
  )
}

const MOST_NAMED = 8

function listOf(names: readonly string[]): string {
  const more = names.length - MOST_NAMED
  return `${names.slice(0, MOST_NAMED).join(', ')}${more > 0 ? ` and ${more} more` : ''}`
}

interface Props {
  galaxy: MovedGalaxy
  names: ReadonlyMap<string, string>
}

function Arrival({ galaxy, names }: Props) {
  return (
    <tbody>
      <tr className="border-b border-line">
        <th scope="row" className="py-1.5 pr-3 text-left font-normal whitespace-nowrap">{galaxy.name}</th>
        <td className="px-3 py-1.5 text-accent">new</td>
        <td colSpan={3} className="px-3 py-1.5 text-right font-semibold">{arrivalWords(galaxy, names)}</td>
      </tr>
    </tbody>
  )
}

function Moves({ galaxy, names }: Props) {
  const [all, setAll] = useState(false)
  const first = galaxy.changes.filter(isFirst)
  // Where nothing of the first kind moves, what does move is shown straight away.
  const rest = first.length === 0 ? [] : galaxy.changes.filter((c) => !isFirst(c))
  const shown = first.length === 0 || all ? galaxy.changes : first
  return (
    <tbody>
      {shown.map((change, i) => (
        <tr key={change.column} className={i === shown.length - 1 && rest.length === 0 ? 'border-b border-line' : 'border-b border-line/60'}>
          <th scope="row" className="py-1.5 pr-3 text-left font-normal whitespace-nowrap">
            {i === 0 ? <Link to={paths.galaxy(galaxy.slug)} look="quiet">{galaxy.name}</Link> : <span className="sr-only">{galaxy.name}</span>}
          </th>
          <Values change={change} names={names} />
        </tr>
      ))}
      {rest.length > 0 && (
        <tr className="border-b border-line">
          <td />
          <td colSpan={4} className="px-3 py-1">
            <button type="button" aria-expanded={all} onClick={() => setAll(!all)} className="min-h-6 text-sm text-muted underline underline-offset-2 hover:text-ink">
              {all ? 'Fewer' : `${formatCounted(rest.length, 'further value')}`}
              <span className="sr-only"> of {galaxy.name}</span>
            </button>
          </td>
        </tr>
      )}
    </tbody>
  )
}

function Values({ change, names }: { change: Moved; names: ReadonlyMap<string, string> }) {
  const { column, label, unit, before, after } = change
  return (
    <>
      <td className="px-3 py-1.5 text-muted">{label}</td>
      <td className="px-3 py-1.5 text-right">{before === null ? <Missing /> : <del className="text-muted">{valueWords(column, before, unit, names)}</del>}</td>
      <td className="px-3 py-1.5 text-right font-semibold">{after === null ? <Missing /> : valueWords(column, after, unit, names)}</td>
      <td className="py-1.5 pl-3 text-right">{shiftWords(change)}</td>
    </>
  )
}
