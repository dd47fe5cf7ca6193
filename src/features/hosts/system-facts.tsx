import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { formatCount, formatCounted } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { massWords } from './mass-words.ts'

/** The host in numbers, and its system's. */
export function SystemFacts({ answer: { host, system } }: { answer: HostAnswer }) {
  const { missing } = system.luminosity
  return (
    <DefinitionRows
      rows={[
        { label: 'Distance', value: <Measure value={host.distance} unit="Mpc" decimals={host.distance !== null && host.distance < 0.1 ? 4 : 2} /> },
        { label: 'Stellar mass, log', value: <Measure value={host.logMstar} unit="M☉" decimals={2} /> },
        { label: 'Total mass', help: 'by the policy’s ratio', value: massWords(host.totalMass) },
        { label: <>M<sub>V</sub></>, value: <Measure value={host.absV} unit="mag" decimals={1} /> },
        { label: <>R<sub>200</sub></>, value: <Measure value={host.r200} unit="kpc" decimals={0} /> },
        { label: 'Sphere', help: 'inside it a galaxy can be a satellite', value: <Measure value={host.sphere} unit="kpc" decimals={0} /> },
        { label: 'Zero-velocity radius', value: <Measure value={host.zeroVelocityRadius} unit="kpc" decimals={0} /> },
        {
          label: 'Velocity dispersion', help: host.dispersion === null ? 'needs three velocities' : `gapper, ${formatCounted(host.velocities, 'satellite')}`,
          value: <Measure value={host.dispersion} plus={host.dispersionErr} unit="km/s" decimals={0} />,
        },
        { label: <>v<sub>GSR</sub></>, value: <Measure value={host.vGsr} unit="km/s" decimals={0} /> },
        {
          label: 'Brightest satellite', help: missing > 0 ? <>{formatCount(missing)} without M<sub>V</sub></> : undefined,
          value: host.brightest ? (
            <>
              <Link to={paths.galaxy(host.brightest.slug)}>{host.brightest.name}</Link> <Measure value={host.brightest.absV} unit="mag" decimals={1} />
            </>
          ) : (
            <Measure value={null} />
          ),
        },
      ]}
    />
  )
}
