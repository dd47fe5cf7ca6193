/** What the read routes of the catalogue answer. */
import { z } from 'zod'
import { GALAXY_CLASSES, GALAXY_STATUSES } from '../classes.ts'
import { METHOD_KEYS } from '../methods.ts'
import { QUANTITY_KEYS } from '../quantities.ts'

const number = z.number().nullable()
const text = z.string().nullable()

/** One catalogue row, keyed by column; null for a missing value. */
export const rowSchema = z.record(z.string(), z.union([z.string(), z.number(), z.null()]))

/** GET /api/galaxies */
export const galaxyListSchema = z.object({
  rows: z.array(rowSchema),
  /** Rows that the filter lets through, all pages. */
  total: z.int(),
  /** Cursor of the next page; null on the last. */
  next: text,
  revision: z.int(),
})

/** GET /api/galaxies/facets: under the same filter, each facet counted without its own condition. */
export const facetsSchema = z.object({
  revision: z.int(),
  total: z.int(),
  /** Choice columns: host, class, status, host_relation, distance_method. */
  choices: z.record(z.string(), z.array(z.object({ value: text, label: z.string(), count: z.int() }))),
  /** Real columns: distance, abs_v, abs_b, v_lg, tidal_index; equal bins over [lo, hi]. */
  histograms: z.record(z.string(), z.object({ lo: z.number(), hi: z.number(), counts: z.array(z.int()), missing: z.int() })),
})

/** GET /api/galaxies/points: all matching rows, column-wise. */
export const pointsSchema = z.object({
  revision: z.int(),
  id: z.array(z.int()),
  slug: z.array(z.string()),
  name: z.array(z.string()),
  class: z.array(z.enum(GALAXY_CLASSES)),
  ra: z.array(z.number()),
  dec: z.array(z.number()),
  distance: z.array(number),
  distanceLo: z.array(number),
  distanceHi: z.array(number),
  sgx: z.array(number),
  sgy: z.array(number),
  sgz: z.array(number),
  absV: z.array(number),
  host: z.array(text),
  relation: z.array(z.enum(['host', 'satellite', 'field'])),
})

/** How one measurement entered the adopted value. */
export const reasonSchema = z.object({
  measurementId: z.int(),
  used: z.boolean(),
  /** Share of the adopted value, 0 to 1; 0 when not used. */
  weight: z.number(),
  /** What the scale added to the published value, canonical unit. */
  shift: z.number(),
  /** On the catalogue's scale, canonical unit; null for a text. */
  scaled: number,
  /** The error that entered, canonical unit. */
  error: number,
  /** (scaled − adopted) / error; null where there is no error. */
  residual: number,
  tension: z.boolean(),
  /** "used", "lower tier", "excluded: ...", "superseded by ...", "upper limit", "not the newest" ... */
  reason: z.string(),
  /** "scale unknown", "error assumed" ... */
  flags: z.array(z.string()),
})

export const adoptedSchema = z.object({
  quantity: z.enum(QUANTITY_KEYS),
  value: number,
  textValue: text,
  errPlus: number,
  errMinus: number,
  errSys: number,
  nUsed: z.int(),
  nAll: z.int(),
  chi2: number,
  dof: number,
  /** Intrinsic scatter (tau) that the values ask for beyond their errors, canonical unit. */
  scatter: number,
  method: z.enum(METHOD_KEYS).nullable(),
  /** "Weighted from 3 TRGB values on the catalogue's scale; ..." */
  sentence: z.string(),
  reasons: z.array(reasonSchema),
  /** The reason of an override, where one decided. */
  override: text,
})

export const nameSchema = z.object({ name: z.string(), preferred: z.boolean(), source: text })

/** GET /api/galaxies/:slug */
export const galaxySchema = z.object({
  id: z.int(),
  versionId: z.int(),
  slug: z.string(),
  designation: z.string(),
  status: z.enum(GALAXY_STATUSES),
  class: z.enum(GALAXY_CLASSES),
  ra: z.number(),
  dec: z.number(),
  note: text,
  names: z.array(nameSchema),
  /** Every column of the catalogue. */
  row: rowSchema,
  adopted: z.array(adoptedSchema),
  host: z.object({ slug: z.string(), name: z.string() }).nullable(),
  mainDisturber: z.object({ slug: z.string(), name: z.string() }).nullable(),
  /** The reason of an override, where one decided about the host. */
  hostOverride: text,
  /** Whose satellite it may be, most likely first: the fraction of draws from the distance errors. They sum to at most 1; the rest is that of the field. */
  possibleHosts: z.array(z.object({ slug: z.string(), name: z.string(), probability: z.number() })),
  /** Satellites, when it has any. */
  satellites: z.int(),
  revision: z.int(),
})

export const measurementSchema = z.object({
  id: z.int(),
  versionId: z.int(),
  galaxyId: z.int(),
  quantity: z.enum(QUANTITY_KEYS),
  value: number,
  errPlus: number,
  errMinus: number,
  errSys: number,
  textValue: text,
  limitFlag: z.enum(['upper', 'lower']).nullable(),
  method: z.enum(METHOD_KEYS).nullable(),
  anchor: text,
  anchorValueAssumed: number,
  convention: z.enum(['true', 'sfd']).nullable(),
  published: z.object({ value: z.number(), errPlus: number, errMinus: number, errSys: number, unit: z.string() }).nullable(),
  source: z.object({ id: z.int(), label: z.string(), year: z.int(), bibcode: text, doi: text }),
  locator: text,
  note: text,
  excludedReason: text,
  supersedes: z.int().nullable(),
  enteredBy: text,
  revision: z.int(),
})

/** GET /api/galaxies/:slug/measurements */
export const measurementsSchema = z.object({ revision: z.int(), measurements: z.array(measurementSchema) })

/** GET /api/galaxies/:slug/history: adopted distance and what changed, revision by revision, newest first. */
export const historySchema = z.object({
  entries: z.array(
    z.object({
      revision: z.int(),
      at: z.string(),
      by: text,
      summary: z.string(),
      submission: z.int().nullable(),
      release: text,
      changes: z.array(z.object({ column: z.string(), before: z.union([z.string(), z.number(), z.null()]), after: z.union([z.string(), z.number(), z.null()]) })),
    }),
  ),
})

/** GET /api/galaxies/:slug/neighbours: nearest in three dimensions. */
export const neighboursSchema = z.object({
  revision: z.int(),
  neighbours: z.array(z.object({ slug: z.string(), name: z.string(), class: z.enum(GALAXY_CLASSES), separation: z.number(), distance: z.number() })),
})

/** GET /api/resolve?name= */
export const resolveSchema = z.object({
  matches: z.array(z.object({ slug: z.string(), name: z.string(), matched: z.string(), class: z.enum(GALAXY_CLASSES), ra: z.number(), dec: z.number(), exact: z.boolean() })),
})

const hostSummary = z.object({
  slug: z.string(),
  name: z.string(),
  class: z.enum(GALAXY_CLASSES),
  distance: number,
  logMstar: number,
  members: z.int(),
  /** Radius of the host's sphere, kpc. */
  sphere: number,
  /** Line-of-sight velocity dispersion of the members by the gapper, km/s; its jackknife error; how many velocities. */
  dispersion: number,
  dispersionErr: number,
  velocities: z.int(),
  /** The brightest satellite in V. */
  brightest: z.object({ slug: z.string(), name: z.string(), absV: z.number() }).nullable(),
  /** Minor-to-major axis of the satellites about the host; null with too few of them. */
  minorToMajor: number,
})

/** GET /api/hosts */
export const hostsSchema = z.object({ revision: z.int(), hosts: z.array(hostSummary) })

const vector = z.tuple([z.number(), z.number(), z.number()])
const drawnRange = z.object({ median: z.number(), lo: z.number(), hi: z.number() })

const memberSchema = z.object({
  slug: z.string(),
  name: z.string(),
  class: z.enum(GALAXY_CLASSES),
  distance: number,
  absV: number,
  absVErr: number,
  /** 3-D, kpc: of the adopted distances; median, 16th and 84th percentile of the draws. */
  separation: number,
  separationMedian: number,
  separationLo: number,
  separationHi: number,
  probability: number,
  /** On the sky, deg. */
  angle: number,
  /** Velocity less that of the host, Galactic standard of rest, km/s. */
  dv: number,
  dvErr: number,
  /** Supergalactic offset from the host, kpc. */
  offset: vector.nullable(),
  /** Away from the observer, unit vector; how much nearer and farther along it by one standard deviation of its own distance, kpc. */
  sight: z.object({ direction: vector, nearer: z.number(), farther: z.number() }).nullable(),
})

const shapeSchema = z.object({
  /** Ratios of the rms extents about the host. */
  minorToMajor: z.number(),
  middleToMajor: z.number(),
  /** Rms height about the plane through the host, kpc. */
  height: z.number(),
  /** Rms extent along the major axis, kpc. */
  extent: z.number(),
  /** Supergalactic unit vectors: major axis, intermediate axis, normal. */
  axes: z.tuple([vector, vector, vector]),
  /** Of the normal's two ends the one with SGB ≥ 0, deg. */
  pole: z.object({ sgl: z.number(), sgb: z.number() }),
  drawn: z.object({
    draws: z.int(),
    minorToMajor: drawnRange,
    middleToMajor: drawnRange,
    height: drawnRange,
    /** Angle about the pole that holds 68 % of the drawn poles, deg. */
    poleSpread: z.number(),
  }),
  isotropy: z.object({
    reshuffles: z.int(),
    asFlat: z.int(),
    /** (asFlat + 1) / (reshuffles + 1), with its binomial error. */
    p: z.number(),
    error: z.number(),
    /** Minor-to-major ratios of the reshuffles: equal bins over [0, 1]. */
    histogram: z.array(z.int()),
  }),
  /** Rms error of the places along the line of sight, kpc; angle of the major axis to it, deg; whether the errors rule the shape. */
  stretch: z.object({ depthError: z.number(), alongSight: number, dominates: z.boolean() }),
})

/** GET /api/hosts/:slug */
export const hostSchema = z.object({
  revision: z.int(),
  host: hostSummary.extend({ ra: z.number(), dec: z.number(), absV: number, vGsr: number, r200: number, zeroVelocityRadius: number, /** Msun, by the policy's ratio. */ totalMass: number }),
  members: z.array(memberSchema),
  system: z.object({
    /** Cumulative, brightest first, with Poisson limits; and how many satellites have no magnitude. */
    luminosity: z.object({ steps: z.array(z.object({ slug: z.string(), absV: z.number(), count: z.int(), lo: z.number(), hi: z.number() })), missing: z.int() }),
    /** Satellites with a place beside the host, and how many a shape needs. */
    placed: z.int(),
    needed: z.int(),
    shape: shapeSchema.nullable(),
  }),
})

/** GET /api/summary: the catalogue at a glance. */
export const summarySchema = z.object({
  revision: z.int(),
  galaxies: z.int(),
  measurements: z.int(),
  sources: z.int(),
  hosts: z.int(),
  byClass: z.array(z.object({ class: z.enum(GALAXY_CLASSES), count: z.int() })),
  release: z.object({ label: z.string(), title: z.string(), publishedAt: z.string(), revision: z.int() }).nullable(),
  /** Newest revisions first. */
  recent: z.array(z.object({ revision: z.int(), at: z.string(), by: text, summary: z.string() })),
  /** What waits for the reader: empty for a visitor. */
  waiting: z.array(z.object({ submission: z.int(), title: z.string(), why: z.string(), since: z.string() })),
})

export type Row = z.infer<typeof rowSchema>
export type GalaxyList = z.infer<typeof galaxyListSchema>
export type Facets = z.infer<typeof facetsSchema>
export type Points = z.infer<typeof pointsSchema>
export type Reason = z.infer<typeof reasonSchema>
export type AdoptedAnswer = z.infer<typeof adoptedSchema>
export type GalaxyAnswer = z.infer<typeof galaxySchema>
export type MeasurementAnswer = z.infer<typeof measurementSchema>
export type History = z.infer<typeof historySchema>
export type HostsAnswer = z.infer<typeof hostsSchema>
export type HostAnswer = z.infer<typeof hostSchema>
export type Summary = z.infer<typeof summarySchema>
export type Resolved = z.infer<typeof resolveSchema>
