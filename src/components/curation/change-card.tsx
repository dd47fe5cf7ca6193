import type { ReactNode } from 'react'
import { quantityNamed } from '../../../core/quantities.ts'
import type { ChangeAnswer } from '../../../core/schema/submissions.ts'
import { paths } from '../../paths.ts'
import { CheckMark } from '../badge.tsx'
import { Link } from '../link.tsx'
import { Missing } from '../measure.tsx'
import { ScrollAcross } from '../scroll-across.tsx'
import { Sheet } from '../sheet.tsx'
import { ConflictTable } from './conflict-table.tsx'

const ACTION_WORDS: Readonly<Record<ChangeAnswer['action'], string>> = {
  'measurement.add': 'new measurement',
  'measurement.replace': 'mended measurement',
  'measurement.exclude': 'measurement excluded',
  'galaxy.add': 'new galaxy',
  'galaxy.amend': 'galaxy amended',
  'name.add': 'new name',
  'measurement.restore': 'measurement restored',
  'anchor.set': 'anchor',
  'policy.set': 'policy',
  'override.set': 'override',
  'override.clear': 'override cleared',
}

export interface ChangeCardProps {
  change: ChangeAnswer
  /** "Change 1 of 4" */
  number: number
  of: number
  actions?: ReactNode
  selected?: boolean
  children?: ReactNode
}

/** One change of a submission: what is proposed beside what holds, where the value stands, what the checks say. */
export function ChangeCard({ change, number, of, actions, selected, children }: ChangeCardProps) {
  return (
    <Sheet
      as="article"
      level={2}
      selected={selected}
      title={
        <>
          <span className="sr-only">{`Change ${number} of ${of}: `}</span>
          {change.galaxy ? <Link to={paths.galaxy(change.galaxy.slug)} look="quiet">{change.subject}</Link> : change.subject}
          <span className="ml-3 font-sans text-sm font-normal text-muted">
            {ACTION_WORDS[change.action]} <span aria-hidden>{`· ${number} of ${of}`}</span>
          </span>
        </>
      }
      actions={actions}
    >
      {change.standing ? <StandingTable standing={change.standing} /> : null}
      <Diff change={change} />
      {change.checks.length > 0 && (
        <ul className="mt-4 grid gap-1.5" aria-label="Automatic checks">
          {change.checks.map((c) => (
            <li key={c.check + c.sentence}>
              <CheckMark outcome={c.level}>{c.sentence}</CheckMark>
            </li>
          ))}
        </ul>
      )}
      {change.conflicts.length > 0 && <ConflictTable conflicts={change.conflicts} />}
      {children}
    </Sheet>
  )
}

function StandingTable({ standing }: { standing: NonNullable<ChangeAnswer['standing']> }) {
  const isDistance = quantityNamed(standing.quantity)?.adoption === 'distance'
  return (
    <ScrollAcross label="Where the value stands" className="mb-4">
      <table className="w-full min-w-[34rem] border-collapse figures">
        <thead className="text-left text-sm text-muted">
          <tr className="border-b border-line">
            <td className="py-1.5" />
            <th scope="col" className="px-3 py-1.5 text-right font-semibold">published</th>
            {isDistance && <th scope="col" className="px-3 py-1.5 text-right font-semibold">on our scale</th>}
            <th scope="col" className="px-3 py-1.5 font-semibold">method</th>
            <th scope="col" className="px-3 py-1.5 font-semibold">anchor</th>
            <th scope="col" className="px-3 py-1.5 font-semibold">source</th>
          </tr>
        </thead>
        <tbody>
          <tr className="border-b border-line">
            <th scope="row" className="py-2 text-left font-normal text-muted">new</th>
            <td className="px-3 py-2 text-right font-semibold">{standing.published ?? <Missing />}</td>
            {isDistance && <td className="px-3 py-2 text-right font-semibold">{standing.scaled ?? <Missing />}</td>}
            <td className="px-3 py-2">{standing.method ?? <Missing />}</td>
            <td className="px-3 py-2">{standing.anchor ?? <Missing />}</td>
            <td className="px-3 py-2">{standing.source}</td>
          </tr>
          <tr>
            <th scope="row" className="py-2 text-left font-normal text-muted">adopted so far</th>
            <td className="px-3 py-2 text-right">{isDistance ? null : (standing.adopted ?? 'nothing')}</td>
            {isDistance && <td className="px-3 py-2 text-right">{standing.adopted ?? 'nothing'}</td>}
            <td colSpan={3} />
          </tr>
        </tbody>
      </table>
    </ScrollAcross>
  )
}

/** What differs, field by field. Of a new measurement the table above says most, so its fields are folded. */
function Diff({ change: { diff, standing } }: { change: ChangeAnswer }) {
  const isAddition = diff.every((d) => d.before === null)
  if (diff.length === 0) return null
  if (!standing || !isAddition) return <DiffTable diff={diff} isAddition={isAddition} />
  return (
    <details>
      <summary className="w-fit cursor-pointer text-sm text-muted hover:text-ink">All {diff.length} fields as entered</summary>
      <div className="mt-2"><DiffTable diff={diff} isAddition /></div>
    </details>
  )
}

function DiffTable({ diff, isAddition }: { diff: ChangeAnswer['diff']; isAddition: boolean }) {
  return (
    <ScrollAcross label="What differs">
      <table className="w-full border-collapse figures">
        <thead className="text-left text-sm text-muted">
          <tr className="border-b border-line">
            <th scope="col" className="py-1.5 pr-3 font-semibold">field</th>
            {!isAddition && <th scope="col" className="px-3 py-1.5 font-semibold">now</th>}
            <th scope="col" className="px-3 py-1.5 font-semibold">proposed</th>
          </tr>
        </thead>
        <tbody>
          {diff.map((d) => (
            <tr key={d.field} className="border-b border-line last:border-0">
              <th scope="row" className="py-1.5 pr-3 text-left font-normal text-muted">{d.field}</th>
              {!isAddition && <td className="px-3 py-1.5">{d.before === null ? <Missing /> : <del className="text-muted">{d.before}</del>}</td>}
              <td className="px-3 py-1.5 font-semibold">{d.after ?? <Missing />}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollAcross>
  )
}
