/**
 * One share of the galaxies when everything is computed anew: adopted and derived first, then placed among all, then held against what stands.
 * The three steps follow one another, since nobody can be placed before everybody has a distance. Whether a share is the whole, or one of
 * several in threads of their own, makes no difference to what comes out.
 */
import type { Knex } from 'knex'
import type { Scale } from '../../../../core/adoption/adopted.ts'
import { neighbourFrom, neighbourhoodOf, type Neighbour } from '../../../../core/derive/neighbourhood.ts'
import type { OwnColumns } from '../../../../core/derive/own.ts'
import { NOWHERE, relationsOf, type Relation } from '../../../../core/derive/relation.ts'
import { rowOf } from '../../../../core/derive/row.ts'
import { effectOfRows, mergeEffects, nothing, type CatalogueEffect } from '../../../../core/effect.ts'
import { adoptGalaxies } from '../adopt-galaxies.ts'
import { adoptedDifferences, sameRow, standingRows } from '../compare.ts'
import { loadHostOverrides } from '../load.ts'
import type { PlannedRow } from '../plan.ts'
import { adoptedBatch, parts, rowsBatch, type Batch } from '../write.ts'

export interface AdoptInput {
  ids: readonly number[]
  scale: Scale
  /** As which revision what differs is to be written; null when it is only to be foreseen. */
  writing: number | null
}

/** Where results go while a step runs. */
export interface Outlet {
  /** Takes what is to be written; resolves when more may come. */
  batch: (batch: Batch) => Promise<void>
  /** Tells how many galaxies of the share are done. */
  progress: (done: number) => void
}

/** What whoever computes a share can be asked, in this order, each once. */
export interface Sharer {
  /** @returns what the others have to know of the share's galaxies to be placed */
  adopt: (input: AdoptInput, outlet: Outlet) => Promise<Neighbour[]>
  /** @param everybody - of all shares. @returns how many satellites of the share each host has, by id */
  place: (everybody: readonly Neighbour[], outlet: Outlet) => Promise<Map<number, number>>
  /** @param hosting - ids of all galaxies that have satellites. @returns the share's part of the effect; empty when it was written instead */
  finish: (hosting: ReadonlySet<number>, outlet: Outlet) => Promise<CatalogueEffect>
  close: () => Promise<void>
}

/** Galaxies whose measurements are in memory at a time. */
const CHUNK = 2000

/** @param reader - sees the galaxies and measurements, and what stands of the adopted values and rows */
export function shareOf(reader: Knex): Sharer {
  let task: AdoptInput = { ids: [], scale: { anchors: [], policy: undefined as never }, writing: null }
  const own = new Map<number, OwnColumns>()
  let relations: ReadonlyMap<number, Relation> = new Map()
  let names: ReadonlyMap<string, string> = new Map()

  const planned = async (ids: readonly number[], hosting: ReadonlySet<number>): Promise<PlannedRow[]> => {
    const standing = await standingRows(reader, ids)
    return ids.flatMap((id): PlannedRow[] => {
      const columns = own.get(id)
      const relation = relations.get(id) ?? NOWHERE
      if (!columns) return []
      const row = {
        galaxyId: id, before: standing.get(id) ?? null, after: rowOf(columns, relation, hosting.has(id)), mainDisturber: relation.mainDisturber, indexDisturber: relation.indexDisturber,
        possibleHosts: relation.possibleHosts,
      }
      return sameRow(row) ? [] : [row]
    })
  }

  return {
    adopt: async (input, outlet) => {
      task = input
      const neighbours: Neighbour[] = []
      for (const ids of parts(input.ids, CHUNK)) {
        const computed = await adoptGalaxies(reader, ids, input.scale)
        if (input.writing !== null) {
          for (const part of parts(await adoptedDifferences(reader, computed))) await outlet.batch(adoptedBatch(input.writing, part))
        }
        for (const c of computed) {
          own.set(c.galaxy.id, c.own)
          const neighbour = neighbourFrom(c.galaxy.id, c.own)
          if (neighbour) neighbours.push(neighbour)
        }
        outlet.progress(own.size)
      }
      return neighbours
    },

    place: async (everybody, outlet) => {
      names = new Map(everybody.map((g) => [g.slug, g.name]))
      relations = relationsOf(neighbourhoodOf(everybody), task.ids, task.scale.policy, await loadHostOverrides(reader), outlet.progress)
      const satellites = new Map<number, number>()
      for (const { isSatellite, mainDisturber } of relations.values()) {
        if (isSatellite && mainDisturber !== null) satellites.set(mainDisturber, (satellites.get(mainDisturber) ?? 0) + 1)
      }
      return satellites
    },

    finish: async (hosting, outlet) => {
      const at = new Date().toISOString()
      let effect = nothing()
      let done = 0
      for (const ids of parts(task.ids, CHUNK)) {
        const rows = await planned(ids, hosting)
        if (task.writing === null) effect = mergeEffects([effect, effectOfRows(rows, () => 0, (slug) => names.get(slug) ?? slug)])
        else for (const part of parts(rows)) await outlet.batch(rowsBatch(task.writing, at, part))
        outlet.progress((done += ids.length))
      }
      return effect
    },

    close: () => Promise.resolve(),
  }
}
