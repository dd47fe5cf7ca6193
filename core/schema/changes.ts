/** The actions of a change, and what each carries. */
import { z } from 'zod'
import { GALAXY_CLASSES, GALAXY_STATUSES } from '../classes.ts'
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

export const changePayloadSchemas = {
  'measurement.add': z.strictObject({ galaxy: galaxyRefSchema, measurement: measurementInputSchema }),
  /** Mends an entry: a slip in what was typed, not a newer word of the authors. */
  'measurement.replace': z.strictObject({ measurementId: z.int().positive(), measurement: measurementInputSchema, reason }),
  'measurement.exclude': z.strictObject({ measurementId: z.int().positive(), reason }),
  'galaxy.add': z.strictObject({
    ...galaxyFields,
    status: galaxyFields.status.default('confirmed'),
    note: galaxyFields.note.default(null),
    names: z.array(designation).max(60).default([]),
  }),
  'galaxy.amend': z.strictObject({
    galaxy: z.strictObject({ slug: z.string().min(1).max(120) }),
    set: z.strictObject(galaxyFields).partial().refine((set) => Object.values(set).some((v) => v !== undefined), 'Change at least one field.'),
    reason,
  }),
  'name.add': z.strictObject({ galaxy: galaxyRefSchema, name: designation, sourceId: z.int().positive().nullable().default(null) }),
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
])

export type GalaxyRef = z.infer<typeof galaxyRefSchema>
export type ChangeInput = z.infer<typeof changeInputSchema>
export type ChangeForm = z.input<typeof changeInputSchema>
