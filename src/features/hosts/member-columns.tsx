import { classLabel } from '../../../core/classes.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import type { DataColumn } from '../../components/data-column.ts'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { paths } from '../../paths.ts'

type Member = HostAnswer['members'][number]

/** The columns of a system's table of satellites. */
export const MEMBER_COLUMNS: readonly DataColumn<Member>[] = [
  { key: 'name', header: 'Satellite', text: (m) => m.name, render: (m) => <Link to={paths.galaxy(m.slug)}>{m.name}</Link>, sortable: true, width: 190 },
  { key: 'class', header: 'Class', text: (m) => classLabel(m.class), sortable: true, width: 140 },
  {
    key: 'separation', header: 'Separation', unit: 'kpc', text: (m) => m.separation, decimals: 0, sortable: true, width: 150, help: '3-D separation from the host; errors are the 16th and 84th percentiles of the draws',
    render: (m) => <Measure value={m.separation} decimals={0} plus={gap(m.separationHi, m.separation)} minus={gap(m.separation, m.separationLo)} />,
  },
  { key: 'probability', header: 'Membership', text: (m) => m.probability, decimals: 2, sortable: true, width: 120, help: 'Fraction of draws from the distance errors in which the galaxy is a satellite of this host' },
  { key: 'angle', header: 'Angle', unit: 'deg', text: (m) => m.angle, decimals: 2, sortable: true, width: 100 },
  { key: 'dv', header: 'Δv', unit: 'km/s', text: (m) => m.dv, decimals: 0, sortable: true, width: 100, help: 'Velocity less that of the host, Galactic standard of rest' },
  { key: 'distance', header: 'Distance', unit: 'Mpc', text: (m) => m.distance, decimals: 3, sortable: true, width: 110 },
  { key: 'absV', header: 'M_V', unit: 'mag', text: (m) => m.absV, decimals: 1, sortable: true, width: 90 },
]

/** An error bar is never negative: the median of the draws may lie on the other side of the value. */
function gap(upper: number | null, lower: number | null): number | null {
  return upper === null || lower === null ? null : Math.max(0, upper - lower)
}
