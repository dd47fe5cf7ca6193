import { METHODS } from '../../../../core/methods.ts'
import { HOST_FIELDS, HOST_MEANINGS, METHOD_FIELDS, type HostField, type MethodField } from '../../../../core/scale/policy-leaves.ts'
import { classNames } from '../../../lib/class-names.ts'
import { unitText } from '../../../lib/format.ts'
import { ScrollAcross } from '../../scroll-across.tsx'
import { TextField } from '../../text-field.tsx'
import type { TypedPolicy } from './policy-typed.ts'

export interface PolicyFieldsProps {
  /** As it holds, by path. */
  held: TypedPolicy
  /** Typed so far, by path; the rest is as it holds. */
  typed: TypedPolicy
  onChange: (typed: TypedPolicy) => void
  /** @param path - of the leaf */
  errorOf: (path: string) => string | undefined
}

const HEADS: Readonly<Record<MethodField, string>> = { tier: 'Tier', systematic: 'Systematic', unscaled: 'Scale unknown', defaultError: 'Error if none' }
const fieldKeys = <K extends string>(record: Readonly<Record<K, unknown>>): K[] => Object.keys(record) as K[]

/** The rule of every method: its tier and its errors. What differs from what holds stands out. */
export function MethodRuleFields({ held, typed, onChange, errorOf }: PolicyFieldsProps) {
  return (
    <ScrollAcross label="Rules of methods">
      <table className="w-full min-w-[36rem] table-fixed border-collapse">
        <thead className="text-left text-sm text-muted">
          <tr className="border-b border-line">
            <th scope="col" className="sticky left-0 w-[34%] bg-sheet py-1.5 pr-3 font-semibold">Method</th>
            {fieldKeys(METHOD_FIELDS).map((field) => (
              <th key={field} scope="col" className="px-2 py-1.5 font-semibold">
                {HEADS[field]}
                <span className="block text-xs font-normal">{METHOD_FIELDS[field].unit || 'first is believed first'}</span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {METHODS.map((m) => (
            <tr key={m.key} className="border-b border-line/60 align-top">
              <th scope="row" className="sticky left-0 bg-sheet py-2.5 pr-3 text-left font-normal">{m.label}</th>
              {fieldKeys(METHOD_FIELDS).map((field) => (
                <td key={field} className="px-2 py-1">
                  <LeafField path={`methods.${m.key}.${field}`} label={`${m.label}: ${METHOD_FIELDS[field].label}`} hideLabel {...{ held, typed, onChange, errorOf }} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollAcross>
  )
}

/** How hosts are found, and the limits that go for all. */
export function HostRuleFields(props: PolicyFieldsProps) {
  const label = (field: HostField): string => HOST_FIELDS[field].label.charAt(0).toUpperCase() + HOST_FIELDS[field].label.slice(1)
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2 lg:grid-cols-3">
      {fieldKeys(HOST_FIELDS).map((field) => (
        <LeafField key={field} path={`host.${field}`} label={label(field)} unit={HOST_FIELDS[field].unit && unitText(HOST_FIELDS[field].unit)} help={HOST_MEANINGS[field]} {...props} />
      ))}
      <LeafField path="tension" label="Tension" unit="σ" help="A measurement farther than this from the adopted value is flagged, never dropped." {...props} />
      <LeafField path="name" label="Name of the policy" help="Tells this policy from earlier ones." {...props} />
    </div>
  )
}

interface LeafFieldProps extends PolicyFieldsProps {
  path: string
  label: string
  hideLabel?: boolean
  unit?: string
  help?: string
}

function LeafField({ path, label, hideLabel, unit, help, held, typed, onChange, errorOf }: LeafFieldProps) {
  const was = held[path] ?? ''
  const text = typed[path] ?? was
  const differs = text !== was
  const change = (next: string): void => {
    const { [path]: _, ...rest } = typed
    onChange(next === was ? rest : { ...rest, [path]: next })
  }
  const note = differs ? `so far ${was === '' ? 'none' : was}` : undefined
  return <TextField label={label} hideLabel={hideLabel} value={text} onChange={change} unit={unit || undefined} error={errorOf(path)} help={hideLabel ? note : <>{help}{note && <strong className="font-semibold">{` ${note.charAt(0).toUpperCase()}${note.slice(1)}.`}</strong>}</>} className={classNames(differs && 'font-semibold')} />
}
