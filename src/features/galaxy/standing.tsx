import type { ReactNode } from 'react'
import { GAP } from '../../../core/spaces.ts'
import type { GalaxyAnswer } from '../../../core/schema/catalogue.ts'
import { DefinitionRows, type DefinitionRow } from '../../components/definition-rows.tsx'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { formatNumber } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'
import { away, rowNumber } from './adopted-words.ts'
import { OverrideLinks } from './override-links.tsx'

/** The adopted distance, large. */
export function AdoptedDistance({ galaxy }: { galaxy: GalaxyAnswer }) {
  const [value, lo, hi] = ['distance', 'distance_lo', 'distance_hi'].map((key) => rowNumber(galaxy, key))
  const [dm, stat, sys] = ['dm', 'dm_err', 'dm_err_sys'].map((key) => rowNumber(galaxy, key))
  if (value == null) {
    return (
      <Sheet>
        <p className="text-muted">adopted distance</p>
        <p className="mt-1">None yet: no approved distance can be adopted.</p>
      </Sheet>
    )
  }
  const decimals = value < 1 ? 3 : 2
  return (
    <Sheet>
      <p className="text-muted">adopted distance</p>
      <p>
        <Measure value={value} plus={away(hi ?? null, value)} minus={away(value, lo ?? null)} unit="Mpc" decimals={decimals} size="large" stacked />
      </p>
      <p className="figures">
        {`μ = ${formatNumber(dm, 2)}${stat == null ? '' : `${GAP}±${GAP}${formatNumber(stat, 2)} (stat)`}${sys == null ? '' : `${GAP}±${GAP}${formatNumber(sys, 2)} (sys)`}${GAP}mag`}
      </p>
    </Sheet>
  )
}

/** Where the galaxy is, what it is near, how bright, large and fast. Rows without a value are left out. */
export function Standing({ galaxy, at, canWrite }: { galaxy: GalaxyAnswer; at: string | null; canWrite: boolean }) {
  const value = (key: string): number | null => rowNumber(galaxy, key)
  const rows: (DefinitionRow | null)[] = [
    separation(galaxy, at),
    line(galaxy, <>SGX, SGY, SGZ</>, value('sgx') === null ? null : <span className="whitespace-nowrap">{`${['sgx', 'sgy', 'sgz'].map((key) => formatNumber(value(key), 2)).join(', ')}${GAP}Mpc`}</span>),
    measured(galaxy, <>M<sub>V</sub></>, 'abs_v', 1, 'mag', undefined, value('abs_v_err')),
    measured(galaxy, <>M<sub>B</sub></>, 'abs_b', 1, 'mag', undefined, value('abs_b_err')),
    measured(galaxy, <>M<sub>K</sub></>, 'abs_k', 1, 'mag', undefined, value('abs_k_err')),
    measured(galaxy, 'Half-light radius', 'r_half_pc', 0, 'pc', 'semi-major', value('r_half_pc_err')),
    measured(galaxy, 'Isophotal diameter', 'diameter_kpc', 1, 'kpc', 'major axis, B = 25 mag/arcsec²', value('diameter_kpc_err')),
    measured(galaxy, 'Surface brightness', 'mu_half', 1, 'mag/arcsec2', 'mean in V inside the half-light radius', value('mu_half_err')),
    measured(galaxy, <>v<sub>☉</sub></>, 'v_hel', 0, 'km/s', undefined, value('v_hel_err')),
    measured(galaxy, <>v<sub>GSR</sub></>, 'v_gsr', 0, 'km/s', undefined, value('v_hel_err')),
    measured(galaxy, <>v<sub>LG</sub></>, 'v_lg', 0, 'km/s', undefined, value('v_hel_err')),
    measured(galaxy, 'Velocity against the host', 'host_dv', 0, 'km/s', undefined, value('host_dv_err')),
    measured(galaxy, 'Stellar mass, log', 'log_mstar', 2, 'M☉', undefined, value('log_mstar_err')),
    measured(galaxy, 'H I mass, log', 'log_mhi', 2, 'M☉', undefined, value('log_mhi_err')),
    measured(galaxy, 'Tidal index', 'tidal_index', 2, undefined, 'above 0 within a neighbour’s reach'),
    galaxy.mainDisturber && { label: 'Main disturber', value: <Link to={withQuery(paths.galaxy(galaxy.mainDisturber.slug), { at })}>{galaxy.mainDisturber.name}</Link> },
    { label: 'Galactic l, b', value: `${formatNumber(value('glon'), 2)}°, ${formatNumber(value('glat'), 2)}°` },
    { label: 'Last changed', value: `revision ${formatNumber(value('revision'), 0)}` },
  ]
  return (
    <Sheet title="Where it stands">
      <DefinitionRows rows={rows.filter((row) => row !== null)} />
      {galaxy.hostOverride !== null && <p className="mt-3 text-muted">{`The host was decided against the rule: ${galaxy.hostOverride}`}</p>}
      {canWrite && value('distance') !== null && <p className="mt-3">Host: <OverrideLinks galaxy={galaxy} about="host" isOverridden={galaxy.hostOverride !== null} /></p>}
    </Sheet>
  )
}

function line(_galaxy: GalaxyAnswer, label: ReactNode, value: ReactNode | null): DefinitionRow | null {
  return value === null ? null : { label, value }
}

function measured(galaxy: GalaxyAnswer, label: ReactNode, column: string, decimals: number, unit?: string, help?: string, error?: number | null): DefinitionRow | null {
  const value = rowNumber(galaxy, column)
  return value === null ? null : { label, help, value: <Measure value={value} plus={error} minus={error} unit={unit} decimals={decimals} /> }
}

/** From the host where there is one, from the main disturber otherwise. */
function separation(galaxy: GalaxyAnswer, at: string | null): DefinitionRow | null {
  const from = galaxy.host ?? galaxy.mainDisturber
  const [r, median, lo, hi, angle] = ['host_sep', 'host_sep_median', 'host_sep_lo', 'host_sep_hi', 'host_angle'].map((key) => rowNumber(galaxy, key))
  if (!from || r == null) return null
  const onSky = angle == null ? '' : `; ${formatNumber(angle, 2)}° on the sky`
  return {
    label: <>from <Link to={withQuery(galaxy.host ? paths.host(from.slug) : paths.galaxy(from.slug), { at })}>{from.name}</Link>, 3-D</>,
    // Behind a host every error makes the separation larger: what the adopted distances give may lie outside the range.
    help: median == null ? onSky.slice(2) : `median of the draws, 16 to 84 %; ${formatNumber(r, 0)}${GAP}kpc from the adopted distances${onSky}`,
    value: (
      <span className="whitespace-nowrap">
        <Measure value={median ?? r} plus={away(hi ?? null, median ?? r)} minus={away(median ?? r, lo ?? null)} unit="kpc" decimals={0} stacked />
      </span>
    ),
  }
}
