/** Writes core/figure/font-metrics.ts from the fonts that figures are set in. Run it when a font package changes: npx tsx scripts/font-metrics.ts */
import { writeFile } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'
import { advanceTable } from '../server/figures/font-advances.ts'

const HEAD = `/** Advance widths of the shipped fonts, thousandths of an em, by first code point of a run. Made by scripts/font-metrics.ts. */
import type { Face } from './scene.ts'

export const FONT_ADVANCES: Readonly<Record<Face, readonly (readonly [first: number, widths: string])[]>> = {
`

const table = await advanceTable()
const body = Object.entries(table)
  .map(([face, runs]) => `  '${face}': [\n${runs.map(([first, widths]) => `    [${first}, '${widths.join(' ')}'],`).join('\n')}\n  ],`)
  .join('\n')
await writeFile(fileURLToPath(new URL('../core/figure/font-metrics.ts', import.meta.url)), `${HEAD}${body}\n}\n`)
