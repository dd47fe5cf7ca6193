/** What a galaxy does to its surroundings: tidal index, virial and zero-velocity radii. */
import { GRAVITATION_MPC_KM2_PER_S2_MSUN, HUBBLE_TIME_GYR_KM_PER_S_MPC, PLANCK_HUBBLE_KM_PER_S_MPC, PLANCK_OMEGA_MATTER, TIDAL_INDEX_CONSTANT } from './constants.ts'
import { requirePositive, requireWithin, type Mpc, type Msun } from './units.ts'

/**
 * One neighbour's term of the tidal index: log10(M★ / d³) + C. The index is the largest term; above 0 the galaxy is within that
 * neighbour's reach.
 *
 * @param mass - stellar mass of the neighbour, Msun
 * @param distance - 3-D separation, Mpc
 * @see Karachentsev et al. 2013, AJ 145, 101 (C = −10.96 belongs to stellar masses; from memory)
 * @example tidalTerm(5e10, 0.78) // => 0.062686
 */
export function tidalTerm(mass: Msun, distance: Mpc): number {
  requirePositive(mass, 'stellar mass (Msun)')
  requirePositive(distance, 'separation (Mpc)')
  return Math.log10(mass) - 3 * Math.log10(distance) + TIDAL_INDEX_CONSTANT
}

/**
 * Radius inside which the mean density is 200 times the critical one: (G M / (100 H0²))^(1/3).
 *
 * @param mass - total mass, Msun
 * @param hubble - km/s/Mpc
 * @example virialRadius(1e12, 67.4) // => 0.211550
 */
export function virialRadius(mass: Msun, hubble: number): Mpc {
  requirePositive(mass, 'total mass (Msun)')
  requirePositive(hubble, 'Hubble constant (km/s/Mpc)')
  return Math.cbrt((GRAVITATION_MPC_KM2_PER_S2_MSUN * mass) / (100 * hubble ** 2))
}

export interface Cosmology {
  /** km/s/Mpc */
  hubble: number
  /** Matter density of a flat universe, in (0, 1]. */
  omegaMatter: number
}

const PLANCK: Cosmology = { hubble: PLANCK_HUBBLE_KM_PER_S_MPC, omegaMatter: PLANCK_OMEGA_MATTER }

/**
 * M / R0³ of a point mass whose zero-velocity surface has radius R0 today, Msun/Mpc³, in a flat universe with a cosmological constant: the
 * mass for which a shell turns round at R0 after just the age of the universe, by integration of its motion. (The closed form with an
 * inverse hyperbolic cosine that is often quoted belongs to an open universe and is 3 to 4 % high.)
 *
 * @example zeroVelocityMass({ hubble: 67.3, omegaMatter: 0.315 }) // => 1.95264e12
 */
export function zeroVelocityMass(cosmology: Cosmology = PLANCK): number {
  requireWithin(cosmology.omegaMatter, 0.01, 1, 'matter density')
  const { hubble, omegaMatter } = cosmology
  const lambda = 1 - omegaMatter
  // In units of R0 and 1/H0: v² = 2 m (1/x − 1) − Ω_Λ (1 − x²), with m = G M / (H0² R0³).
  const age = lambda === 0 ? 2 / 3 : (2 / (3 * Math.sqrt(lambda))) * Math.asinh(Math.sqrt(lambda / omegaMatter))
  const timeToTurn = (m: number): number => {
    // x = sin²(θ) takes the singularities at both ends out of the integral; Simpson's rule on θ.
    const steps = 512
    const h = Math.PI / 2 / steps
    const integrand = (theta: number): number => {
      const s = Math.sin(theta)
      const x = s * s
      // 2 sin θ cos θ / v, with cos²θ = 1 − x divided out of v² by hand.
      const reduced = (2 * m) / Math.max(x, 1e-300) - lambda * (1 + x)
      return (2 * s) / Math.sqrt(reduced)
    }
    let sum = integrand(0) + integrand(Math.PI / 2)
    for (let i = 1; i < steps; i++) sum += (i % 2 === 1 ? 4 : 2) * integrand(i * h)
    return (sum * h) / 3
  }
  let low = lambda + 1e-9
  let high = 20
  for (let i = 0; i < 200; i++) {
    const middle = (low + high) / 2
    if (timeToTurn(middle) > age) low = middle
    else high = middle
  }
  return (((low + high) / 2) * hubble ** 2) / GRAVITATION_MPC_KM2_PER_S2_MSUN
}

const PLANCK_MASS_PER_CUBE = zeroVelocityMass()

/** Radius of the zero-velocity surface, Mpc, about a total mass (Msun), for the Planck parameters. */
export function zeroVelocityRadius(mass: Msun): Mpc {
  requirePositive(mass, 'total mass (Msun)')
  return Math.cbrt(mass / PLANCK_MASS_PER_CUBE)
}

/** Age of a flat universe, 10⁹ years. */
export function ageGyr({ hubble, omegaMatter }: Cosmology = PLANCK): number {
  const lambda = 1 - omegaMatter
  return (HUBBLE_TIME_GYR_KM_PER_S_MPC / hubble) * (2 / (3 * Math.sqrt(lambda))) * Math.asinh(Math.sqrt(lambda / omegaMatter))
}
