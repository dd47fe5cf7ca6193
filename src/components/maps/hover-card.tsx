import { GAP } from '../../../core/spaces.ts'
import { classLabel } from '../../../core/classes.ts'
import type { FigureGalaxy } from '../../../core/figure/galaxy.ts'
import { formatNumber } from '../../lib/format.ts'
import { ClassMark } from '../class-mark.tsx'

/** A galaxy in a line: "Ostrel IX, dwarf spheroidal, 3.58 Mpc, M_V −9.4". */
export function hoverWords(galaxy: FigureGalaxy): string {
  return [galaxy.name, classLabel(galaxy.class), distanceWords(galaxy), galaxy.absV === null ? null : `M_V ${formatNumber(galaxy.absV, 1)}`].filter(Boolean).join(', ')
}

function distanceWords({ distance }: FigureGalaxy): string {
  return distance === null ? 'no distance' : `${formatNumber(distance, distance < 1 ? 3 : 2)}${GAP}Mpc`
}

export interface HoverCardProps {
  galaxy: FigureGalaxy
  /** Where the galaxy is, and how wide the map, px. */
  left: number
  top: number
  width: number
}

const CARD_PX = 208
const AWAY_PX = 14

/** What the pointer is on, beside it, on the side where there is room. */
export function HoverCard({ galaxy, left, top, width }: HoverCardProps) {
  const atRight = left + AWAY_PX + CARD_PX <= width
  return (
    <div
      aria-hidden
      className="pointer-events-none absolute z-10 -translate-y-1/2 rounded-md border border-line bg-sheet px-3 py-2 text-sm shadow-float"
      style={{ width: CARD_PX, top, left: atRight ? left + AWAY_PX : Math.max(0, left - AWAY_PX - CARD_PX) }}
    >
      <p className="font-serif font-semibold">{galaxy.name}</p>
      <p className="flex items-center gap-1.5">
        <ClassMark galaxyClass={galaxy.class} />
        {classLabel(galaxy.class)}
      </p>
      <p className="figures text-muted">
        {distanceWords(galaxy)}
        {galaxy.absV !== null && (
          <>
            {' · '}M<sub>V</sub> {formatNumber(galaxy.absV, 1)}
          </>
        )}
      </p>
    </div>
  )
}
