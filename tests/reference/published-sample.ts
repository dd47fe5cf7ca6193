/** The published sample as galaxies and measurements: what the computation is tested on from end to end. */
import { readFileSync } from 'node:fs'
import { parse } from 'csv-parse/sync'
import { classFromMorphology } from '../../core/classes.ts'
import type { Galaxy, Measurement } from '../../core/catalogue/types.ts'
import { methodNamed, type MethodKey } from '../../core/methods.ts'
import { slugOf } from '../../core/names.ts'
import { quantityNamed, toCanonical } from '../../core/quantities.ts'
import { anchorNamed, DEFAULT_ANCHORS } from '../../core/scale/anchors.ts'

export type CsvRow = Readonly<Record<string, string>>

/** A check table of this folder. */
export function table(name: string): CsvRow[] {
  return parse(readFileSync(new URL(name, import.meta.url)), { columns: true, skip_empty_lines: true })
}

export interface SampleGalaxy {
  galaxy: Galaxy
  measurements: Measurement[]
}

/** @throws Error when a row names a quantity or method that the registries do not know */
export function publishedSample(): SampleGalaxy[] {
  const rows = table('published.csv')
  const names = [...new Set(rows.map((r) => r.galaxy ?? ''))]
  const sources = [...new Set(rows.map((r) => r.source ?? ''))]
  return names.map((name, i) => {
    const own = rows.filter((r) => r.galaxy === name)
    const morphology = own.find((r) => r.quantity === 'morphology')?.value ?? ''
    const galaxy: Galaxy = {
      id: i + 1, versionId: i + 1, slug: slugOf(name), designation: name, status: 'confirmed', class: classFromMorphology(morphology), ra: Number(own[0]?.ra_deg),
      dec: Number(own[0]?.dec_deg), note: null,
    }
    return { galaxy, measurements: own.map((r) => measurement(r, i + 1, rows.indexOf(r) + 1, sources.indexOf(r.source ?? '') + 1)) }
  })
}

function measurement(r: CsvRow, galaxyId: number, id: number, sourceId: number): Measurement {
  const q = quantityNamed(r.quantity ?? '')
  if (!q) throw new Error(`no quantity is called "${r.quantity ?? ''}"`)
  const number = (key: string): number | null => (r[key] ? Number(r[key]) : null)
  const published = { value: Number(r.value), errPlus: number('err_plus'), errMinus: number('err_minus'), errSys: number('err_sys'), unit: r.unit ?? '' }
  const isText = q.kind === 'text'
  const canonical = isText ? { value: null, errPlus: null, errMinus: null, errSys: null } : toCanonical(q, published)
  const method = r.method ? methodNamed(r.method) : undefined
  if (r.method && q.needsMethod && !method) throw new Error(`no method is called "${r.method}"`)
  return {
    id, versionId: id, galaxyId, quantity: q.key, ...canonical, textValue: isText ? (r.value ?? '') : null, limitFlag: null, method: (method?.key as MethodKey | undefined) ?? null,
    anchor: r.anchor ? (anchorNamed(DEFAULT_ANCHORS, r.anchor)?.key ?? null) : null, anchorValueAssumed: number('anchor_value_assumed'), convention: null, published: isText ? null : published,
    sourceId, sourceLabel: r.source ?? '', sourceYear: Number(/(\d{4})/.exec(r.source ?? '')?.[1] ?? 1991), locator: null, note: r.note || null, excludedReason: null, supersedes: null,
  }
}
