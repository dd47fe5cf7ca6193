/** Adopted values and own columns of some galaxies, from what is held of them inside a transaction. */
import type { Knex } from 'knex'
import { adopt } from '../../../core/adoption/adopt.ts'
import type { Adopted, Scale } from '../../../core/adoption/adopted.ts'
import type { Galaxy, Measurement } from '../../../core/catalogue/types.ts'
import { deriveOwn, type OwnColumns } from '../../../core/derive/own.ts'
import type { QuantityKey } from '../../../core/quantities.ts'
import { loadGalaxies, loadMeasurements, loadOverrides } from './load.ts'

export interface Computed {
  galaxy: Galaxy
  adopted: Map<QuantityKey, Adopted>
  own: OwnColumns
}

export async function adoptGalaxies(trx: Knex, ids: readonly number[], scale: Scale): Promise<Computed[]> {
  if (ids.length === 0) return []
  const galaxies = await loadGalaxies(trx, ids)
  const measurements = await loadMeasurements(trx, ids)
  const overrides = await loadOverrides(trx, ids)
  const held = new Map<number, Measurement[]>()
  for (const m of measurements) {
    const list = held.get(m.galaxyId)
    if (list) list.push(m)
    else held.set(m.galaxyId, [m])
  }
  return galaxies.map((galaxy) => {
    // In one order, so that sums come out the same to the last digit whatever order the database gave.
    const own = (held.get(galaxy.id) ?? []).sort((a, b) => a.id - b.id)
    const byQuantity = new Map<QuantityKey, Measurement[]>()
    for (const m of own) byQuantity.set(m.quantity, [...(byQuantity.get(m.quantity) ?? []), m])
    const adopted = new Map<QuantityKey, Adopted>()
    for (const [quantity, list] of byQuantity) {
      const value = adopt(quantity, list, scale, overrides.get(`${galaxy.id} ${quantity}`) ?? null)
      if (value) adopted.set(quantity, value)
    }
    return { galaxy, adopted, own: deriveOwn(galaxy, adopted, own) }
  })
}
