/** Other galaxies that hold the very value that is proposed for one, from the same source. */
import type { Knex } from 'knex'
import type { Canonical } from '../../../../core/checks/canonical.ts'
import type { QuantityKey } from '../../../../core/quantities.ts'
import type { MeasurementChange } from './of-measurements.ts'

/** Of these no two galaxies of a table are likely to share value and error; of a type, an axis ratio or a reddening many do. */
const TELLING: ReadonlySet<QuantityKey> = new Set(['distance_modulus', 'velocity', 'hi_flux'])

interface Wanted {
  change: MeasurementChange
  value: Canonical
}

/**
 * @param values - in the canonical unit, by change
 * @returns names of the galaxies, by change; those of the same submission among them
 */
export async function elsewhereOf(
  knex: Knex, changes: readonly MeasurementChange[], values: ReadonlyMap<number, Canonical | null>, nameOf: (c: MeasurementChange) => string,
): Promise<Map<number, string[]>> {
  const wanted = changes.flatMap((change): Wanted[] => {
    const value = values.get(change.id)
    return value && value.errPlus !== null && TELLING.has(change.payload.measurement.quantity) ? [{ change, value }] : []
  })
  const found = new Map<number, string[]>()
  const add = (change: number, name: string): void => {
    const names = found.get(change) ?? []
    if (!names.includes(name)) found.set(change, [...names, name])
  }
  for (const { id, name } of await heldElsewhere(knex, wanted)) add(id, name)
  const alike = new Map<string, Wanted[]>()
  for (const w of wanted) {
    const { sourceId, quantity, method } = w.change.payload.measurement
    const key = JSON.stringify([sourceId, quantity, method, w.value])
    alike.set(key, [...(alike.get(key) ?? []), w])
  }
  for (const group of alike.values()) {
    for (const a of group) for (const b of group) if (galaxyKey(a.change) !== galaxyKey(b.change)) add(a.change.id, nameOf(b.change))
  }
  return found
}

function galaxyKey(c: MeasurementChange): string {
  return c.galaxy === null && c.action === 'measurement.add' ? JSON.stringify(c.payload.galaxy) : String(c.galaxy)
}

async function heldElsewhere(knex: Knex, wanted: readonly Wanted[]): Promise<{ id: number; name: string }[]> {
  if (wanted.length === 0) return []
  const of = (pick: (w: Wanted) => string | number | null): (string | number | null)[] => wanted.map(pick)
  const { rows } = (await knex.raw(
    `SELECT p.id, r.name
       FROM unnest(?::integer[], ?::integer[], ?::text[], ?::text[], ?::float8[], ?::float8[], ?::float8[], ?::integer[]) AS p (id, source, quantity, method, value, err_plus, err_minus, galaxy)
       JOIN measurements m ON m.source = p.source AND m.rev_to IS NULL AND m.quantity = p.quantity AND m.method IS NOT DISTINCT FROM p.method AND m.excluded_reason IS NULL
        AND m.galaxy IS DISTINCT FROM p.galaxy AND abs(m.value - p.value) < 1e-9 AND abs(m.err_plus - p.err_plus) < 1e-9 AND m.err_minus IS NOT DISTINCT FROM p.err_minus
       JOIN catalogue_rows r ON r.galaxy = m.galaxy AND r.rev_to IS NULL
      ORDER BY p.id, r.name`,
    [
      of((w) => w.change.id), of((w) => w.change.payload.measurement.sourceId), of((w) => w.change.payload.measurement.quantity), of((w) => w.change.payload.measurement.method),
      of((w) => w.value.value), of((w) => w.value.errPlus), of((w) => w.value.errMinus), of((w) => w.change.galaxy),
    ] as never,
  )) as { rows: { id: number; name: string }[] }
  return rows
}
