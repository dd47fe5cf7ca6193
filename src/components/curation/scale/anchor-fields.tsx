import { METHODS } from '../../../../core/methods.ts'
import { anchorShiftSentence } from '../../../../core/scale/anchor-effect.ts'
import type { ScaleAnswer } from '../../../../core/schema/scale.ts'
import { typedNumber } from '../../../lib/typed-number.ts'
import { Checkbox } from '../../checkbox.tsx'
import { RadioGroup } from '../../radio-group.tsx'
import { TextField } from '../../text-field.tsx'
import type { TypedAnchor } from './anchor-typed.ts'

export interface AnchorFieldsProps {
  typed: TypedAnchor
  onChange: (typed: TypedAnchor) => void
  /** The anchor as it holds; undefined for one that is added. */
  held: ScaleAnswer['anchors'][number] | undefined
  /** All anchors that hold: whose methods are taken. */
  anchors: ScaleAnswer['anchors']
  /** @param field - as the schema names it */
  errorOf: (field: string) => string | undefined
}

/** The fields of an anchor, with a sentence on what the value does to distances. */
export function AnchorFields({ typed, onChange, held, anchors, errorOf }: AnchorFieldsProps) {
  const set = (part: Partial<TypedAnchor>): void => onChange({ ...typed, ...part })
  const value = typedNumber(typed.value)
  const sentence = held && value !== null && !Number.isNaN(value) ? anchorShiftSentence(held, held.value, value) : null
  const methodsError = errorOf('methods') ?? typed.methods.map((_, i) => errorOf(`methods.${i}`)).find((e) => e !== undefined)
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      {!held && <TextField label="Label" value={typed.label} onChange={(label) => set({ label })} error={errorOf('label') ?? errorOf('key')} help="What people read: Mira zero point" />}
      {!held && (
        <RadioGroup
          label="What kind of value"
          options={[
            { id: 'modulus', label: 'Distance modulus', help: 'Of the galaxy that the method is calibrated on: distances grow with it' },
            { id: 'absolute-magnitude', label: 'Absolute magnitude', help: 'Of a candle: distances shrink when it is fainter' },
          ]}
          value={typed.kind}
          onChange={(id) => set({ kind: id === 'modulus' ? 'modulus' : 'absolute-magnitude' })}
        />
      )}
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
        <TextField label="Value" value={typed.value} onChange={(text) => set({ value: text })} unit="mag" error={errorOf('value')} reading={sentence ?? undefined} help={held ? `Adopted: ${String(held.value).replace('-', '−')} mag` : undefined} />
        <TextField label="Error" value={typed.err} onChange={(err) => set({ err })} unit="mag" error={errorOf('err')} />
      </div>
      <TextField label="Source" value={typed.source} onChange={(source) => set({ source })} error={errorOf('source')} help="Where the value comes from, as a citation" />
      {held && <TextField label="Label" value={typed.label} onChange={(label) => set({ label })} error={errorOf('label')} />}
      <details open={!held || methodsError !== undefined}>
        <summary className="mb-1 cursor-pointer">
          <span className="text-sm text-muted">Methods that hang on it: </span>
          {METHODS.filter((m) => typed.methods.includes(m.key)).map((m) => m.label).join(', ') || 'none'}
        </summary>
        <div role="group" aria-label="Methods that hang on it" className="grid gap-x-4 gap-y-0.5 sm:grid-cols-2 lg:grid-cols-3">
          {METHODS.map((m) => {
            const owner = anchors.find((a) => a.key !== typed.key && (a.methods as readonly string[]).includes(m.key))
            return (
              <Checkbox
                key={m.key}
                isSelected={typed.methods.includes(m.key)}
                onChange={(on) => set({ methods: on ? [...typed.methods, m.key] : typed.methods.filter((k) => k !== m.key) })}
                help={owner && `hangs on ${owner.label}`}
              >
                {m.label}
              </Checkbox>
            )
          })}
        </div>
        {methodsError && <p className="mt-1 text-sm text-stop">{methodsError}</p>}
      </details>
    </div>
  )
}
