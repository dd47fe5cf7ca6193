import { classLabel, GALAXY_CLASSES } from '../../../core/classes.ts'
import { ClassMark } from '../../components/class-mark.tsx'
import type { Member } from './member-marks.tsx'

const ROW = 22
const LETTER = 6.4
const GAP_PX = 36

/** What the marks of these satellites mean, in rows as wide as the picture: inside it, so that it goes along into its downloads. */
export function legendOf(members: readonly Pick<Member, 'class'>[], width: number) {
  const classes = GALAXY_CLASSES.filter((key) => members.some((m) => m.class === key))
  let x = 0
  let row = 0
  const places = classes.map((key) => {
    const needed = classLabel(key).length * LETTER + GAP_PX
    if (x > 0 && x + needed > width) {
      x = 0
      row++
    }
    const place = { key, x, y: row * ROW }
    x += needed
    return place
  })
  return { height: classes.length > 0 ? (row + 1) * ROW : 0, places }
}

export function ClassLegend({ legend, x, y }: { legend: ReturnType<typeof legendOf>; x: number; y: number }) {
  return (
    <g aria-hidden transform={`translate(${x} ${y})`}>
      {legend.places.map((place) => (
        <g key={place.key} transform={`translate(${place.x} ${place.y})`}>
          <ClassMark galaxyClass={place.key} size={12} />
          <text x={18} y={10.5} fontSize={13} className="fill-muted">
            {classLabel(place.key)}
          </text>
        </g>
      ))}
    </g>
  )
}
