/** What a curator states of one measurement. Values are as published; the server converts them to the canonical unit. */
import { z } from 'zod'
import { METHOD_KEYS } from '../methods.ts'
import { acceptedUnit, quantity, QUANTITY_KEYS, toCanonical } from '../quantities.ts'

const finite = z.number('This must be a number.')
const errorBar = finite.nonnegative('An error cannot be negative.').nullable()
const shortText = (most: number) => z.string().trim().max(most)

export const measurementInputSchema = z
  .strictObject({
    quantity: z.enum(QUANTITY_KEYS),
    /** In `unit`, as published; null for a text quantity. */
    value: finite.nullable(),
    errPlus: errorBar.default(null),
    errMinus: errorBar.default(null),
    errSys: errorBar.default(null),
    unit: shortText(24).default(''),
    textValue: shortText(80).min(1).nullable().default(null),
    limitFlag: z.enum(['upper', 'lower']).nullable().default(null),
    method: z.enum(METHOD_KEYS).nullable().default(null),
    /** Key of an anchor, and the value of it that the authors assumed (mag). */
    anchor: shortText(60).nullable().default(null),
    anchorValueAssumed: finite.nullable().default(null),
    convention: z.enum(['true', 'sfd']).nullable().default(null),
    sourceId: z.int('Choose a source.').positive(),
    locator: shortText(120).nullable().default(null),
    note: shortText(2000).nullable().default(null),
    /** The measurement (id) that this one replaces as the same team's newer word. */
    supersedes: z.int().positive().nullable().default(null),
  })
  .superRefine((m, context) => {
    const q = quantity(m.quantity)
    const say = (path: string, message: string) => context.addIssue({ code: 'custom', path: [path], message })
    if (q.kind === 'text') {
      if (m.textValue === null) say('textValue', `Type the ${q.label.toLowerCase()}.`)
      if (m.value !== null) say('value', `${q.label} is a text, not a number.`)
      return
    }
    if (m.textValue !== null) say('textValue', `${q.label} is a number, not a text.`)
    if (m.value === null) return say('value', `Type the ${q.label.toLowerCase()}.`)
    if (!acceptedUnit(q, m.unit)) {
      return say('unit', `${q.label} is given in ${q.units.map((u) => u.unit || 'no unit').join(' or ')}, not in "${m.unit}".`)
    }
    const { value } = toCanonical(q, { ...m, value: m.value })
    if (!Number.isFinite(value) || value < q.bounds[0] || value > q.bounds[1]) {
      const unit = q.unit === '' ? '' : ` ${q.unit}`
      const read = m.unit === '' || m.unit === q.unit ? '' : ` (${Number.isFinite(value) ? value.toFixed(q.decimals) : 'no value'}${unit})`
      say('value', `${m.value}${m.unit ? ` ${m.unit}` : ''}${read} is outside ${q.bounds[0]} to ${q.bounds[1]}${unit}, where every galaxy of the Local Volume lies. Check the value and its unit.`)
    }
    if (q.needsMethod && m.method === null) say('method', 'Choose the distance method.')
    if (q.conventions && m.convention === null) say('convention', 'Say whether this is a true reddening or the value of the SFD map.')
    if (m.anchorValueAssumed !== null && m.anchor === null) say('anchor', 'Name the anchor whose value was assumed.')
  })

export type MeasurementInput = z.infer<typeof measurementInputSchema>
export type MeasurementForm = z.input<typeof measurementInputSchema>
