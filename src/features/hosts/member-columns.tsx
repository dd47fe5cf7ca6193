import { classLabel } from '../../../core/classes.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { ClassMark } from '../../components/class-mark.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { paths } from '../../paths.ts'

type Member = HostAnswer['members'][number]

/** The columns of a system's table of satellites. */
export const MEMBER_COLUMNS: readonly DataColumn<Member>[] = [
  { key: 'name', header: 'Satellite', text: (m) => m.name, render: (m) => <Link to={paths.galaxy(m.slug)}>{m.name}</Link>, sortable: true, width: 190 },
  { key: 'class', header: 'Class', text: (m) => classLabel(m.class), render: (m) => <ClassMark galaxyClass={m.class} withLabel />, sortable: true, width: 160 },
  { key: 'separation', header: 'Separation', unit: 'kpc', text: (m) => m.separation, decimals: 0, sortable: true, width: 110, help: '3-D separation from the host, of the adopted distances' },
  {
    key: 'median', header: 'Median', unit: 'kpc', text: (m) => m.separationMedian, decimals: 0, sortable: true, width: 130, help: 'Median of the separation over the draws from the distance errors, to the 16th and 84th percentiles',
    render: (m) => <Measure value={m.separationMedian} decimals={0} plus={gap(m.separationHi, m.separationMedian)} minus={gap(m.separationMedian, m.separationLo)} />,
  },
  { key: 'probability', header: 'Membership', text: (m) => m.probability, decimals: 2, sortable: true, width: 120, help: 'Fraction of draws from the distance errors in which the galaxy is a satellite of this host' },
  { key: 'angle', header: 'Angle', unit: 'deg', text: (m) => m.angle, decimals: 2, sortable: true, width: 100, help: 'On the sky, from the host' },
  {
    key: 'dv', header: 'Δv', unit: 'km/s', text: (m) => m.dv, decimals: 0, sortable: true, width: 110, help: 'Velocity less that of the host, Galactic standard of rest',
    render: (m) => <Measure value={m.dv} decimals={0} plus={m.dvErr} />,
  },
  { key: 'distance', header: 'Distance', unit: 'Mpc', text: (m) => m.distance, decimals: 3, sortable: true, width: 110 },
  { key: 'absV', header: 'M_V', unit: 'mag', text: (m) => m.absV, decimals: 1, sortable: true, width: 110, render: (m) => <Measure value={m.absV} decimals={1} plus={m.absVErr} /> },
]

/** An error bar is never negative. */
function gap(upper: number | null, lower: number | null): number | null {
  return upper === null || lower === null ? null : Math.max(0, upper - lower)
}
