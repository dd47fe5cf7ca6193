/** The actions of a change, and what each carries. */
import { z } from 'zod'
import { GALAXY_CLASSES, GALAXY_STATUSES } from '../classes.ts'
import { METHOD_KEYS } from '../methods.ts'
import { labelInSentence } from '../formats/measure-words.ts'
import { quantity, QUANTITY_KEYS } from '../quantities.ts'
import { ANCHOR_BOUNDS, ANCHOR_KINDS, anchorBoundsWords } from '../scale/anchor-fields.ts'
import { completePolicySchema } from '../scale/policy.ts'
import { measurementInputSchema } from './measurement.ts'

const reason = z.string().trim().min(3, 'Give the reason, in a few words at least.').max(2000)
const designation = z.string().trim().min(1, 'Type the designation.').max(80)
const rightAscension = z.number('This must be a number of degrees.').min(0, 'Right ascension runs from 0 to 360 degrees.').lt(360, 'Right ascension runs from 0 to 360 degrees.')
const declination = z.number('This must be a number of degrees.').min(-90, 'Declination runs from −90 to +90 degrees.').max(90, 'Declination runs from −90 to +90 degrees.')

/** A galaxy of the catalogue by its slug, or one that another change of the same submission adds. */
export const galaxyRefSchema = z.union([
  z.strictObject({ slug: z.string().min(1).max(120) }),
  z.strictObject({ change: z.int().positive() }),
])

const galaxyFields = {
  designation,
  ra: rightAscension,
  dec: declination,
  class: z.enum(GALAXY_CLASSES),
  status: z.enum(GALAXY_STATUSES),
  note: z.string().trim().max(4000).nullable(),
}

const galaxyOfTheCatalogue = z.strictObject({ slug: z.string().min(1).max(120) })

/** An anchor as it is proposed: a new key adds one, a known key sets its fields. */
const anchorSetSchema = z
  .strictObject({
    key: z.string().trim().max(60).regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'A key is made of small letters, digits and single hyphens, like "lmc-modulus".'),
    label: z.string().trim().min(1, 'Give it a label.').max(80),
    kind: z.enum(ANCHOR_KINDS),
    methods: z
      .array(z.enum(METHOD_KEYS))
      .min(1, 'Choose at least one method that hangs on it.')
      .refine((list) => new Set(list).size === list.length, 'A method stands here twice.'),
    /** mag */
    value: z.number('This must be a number of magnitudes.'),
    /** mag */
    err: z.number('This must be a number of magnitudes.').min(0, 'An error cannot be negative.').max(2, 'An error above 2 mag makes no anchor.'),
    source: z.string().trim().min(3, 'Say where the value comes from.').max(300),
    reason,
  })
  .superRefine((a, context) => {
    const [lo, hi] = ANCHOR_BOUNDS[a.kind]
    if (a.value < lo || a.value > hi) context.addIssue({ code: 'custom', path: ['value'], message: anchorBoundsWords(a.kind) })
  })

/** What an override is about: one quantity's adopted value, or the host. */
export const OVERRIDE_SUBJECTS = [...QUANTITY_KEYS, 'host'] as const
export type OverrideSubject = (typeof OVERRIDE_SUBJECTS)[number]
const overrideSubject = z.enum(OVERRIDE_SUBJECTS)

/** "distance modulus", "host": in the middle of a sentence. */
export function overrideSubjectWords(about: OverrideSubject): string {
  return about === 'host' ? 'host' : labelInSentence(quantity(about).label)
}

export const overrideChoiceSchema = z.union(
  [
    z.strictObject({
      measurements: z
        .array(z.int().positive())
        .min(1, 'Choose at least one measurement.')
        .max(200)
        .refine((ids) => new Set(ids).size === ids.length, 'A measurement stands here twice.'),
    }),
    /** null: it has no host. */
    z.strictObject({ host: z.string().min(1).max(120).nullable() }),
  ],
  'Choose measurements, or a host.',
)
export type OverrideChoice = z.infer<typeof overrideChoiceSchema>

const overrideSetSchema = z
  .strictObject({ galaxy: galaxyOfTheCatalogue, about: overrideSubject, choice: overrideChoiceSchema, reason })
  .superRefine((o, context) => {
    const say = (message: string) => context.addIssue({ code: 'custom', path: ['choice'], message })
    if (o.about === 'host' && !('host' in o.choice)) say('Choose the host, or none.')
    if (o.about !== 'host' && !('measurements' in o.choice)) say(`Choose the measurements from which the ${overrideSubjectWords(o.about)} is adopted.`)
  })

export const changePayloadSchemas = {
  'measurement.add': z.strictObject({ galaxy: galaxyRefSchema, measurement: measurementInputSchema }),
  /** Mends an entry: a slip in what was typed, not a newer word of the authors. */
  'measurement.replace': z.strictObject({ measurementId: z.int().positive(), measurement: measurementInputSchema, reason }),
  'measurement.exclude': z.strictObject({ measurementId: z.int().positive(), reason }),
  /** Takes back an exclusion. */
  'measurement.restore': z.strictObject({ measurementId: z.int().positive(), reason }),
  'galaxy.add': z.strictObject({
    ...galaxyFields,
    status: galaxyFields.status.default('confirmed'),
    note: galaxyFields.note.default(null),
    names: z.array(designation).max(60).default([]),
  }),
  'galaxy.amend': z.strictObject({
    galaxy: galaxyOfTheCatalogue,
    set: z.strictObject(galaxyFields).partial().refine((set) => Object.values(set).some((v) => v !== undefined), 'Change at least one field.'),
    reason,
  }),
  'name.add': z.strictObject({ galaxy: galaxyRefSchema, name: designation, sourceId: z.int().positive().nullable().default(null) }),
  'anchor.set': anchorSetSchema,
  /** The whole policy; only what differs from the one it was made from is meant. */
  'policy.set': z.strictObject({ document: completePolicySchema, reason }),
  'override.set': overrideSetSchema,
  'override.clear': z.strictObject({ galaxy: galaxyOfTheCatalogue, about: overrideSubject, reason }),
} as const

export const CHANGE_ACTIONS = Object.keys(changePayloadSchemas) as (keyof typeof changePayloadSchemas)[]
export type ChangeAction = keyof typeof changePayloadSchemas
export type ChangePayload<A extends ChangeAction> = z.infer<(typeof changePayloadSchemas)[A]>

const changeOf = <A extends ChangeAction>(action: A) => z.strictObject({ action: z.literal(action), payload: changePayloadSchemas[action] })

/** The body that adds or rewrites a change. */
export const changeInputSchema = z.discriminatedUnion('action', [
  changeOf('measurement.add'),
  changeOf('measurement.replace'),
  changeOf('measurement.exclude'),
  changeOf('galaxy.add'),
  changeOf('galaxy.amend'),
  changeOf('name.add'),
  changeOf('measurement.restore'),
  changeOf('anchor.set'),
  changeOf('policy.set'),
  changeOf('override.set'),
  changeOf('override.clear'),
])

/** Whether an action moves the scale. A submission that does holds nothing else: a change of scale is judged alone, and the computation relies on it. */
export function movesScale(action: ChangeAction): action is 'anchor.set' | 'policy.set' {
  return action === 'anchor.set' || action === 'policy.set'
}

export type GalaxyRef = z.infer<typeof galaxyRefSchema>
export type ChangeInput = z.infer<typeof changeInputSchema>
export type ChangeForm = z.input<typeof changeInputSchema>
