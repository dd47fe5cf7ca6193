/**
 * The classes of galaxy that the catalogue tells apart, and the reading of a published morphological type.
 *
 * Hubble stages T follow de Vaucouleurs et al. 1991 (RC3): −5 elliptical ... 0 lenticular ... 5 Sc ... 9 Sm, 10 Im.
 */
export const GALAXY_CLASSES = [
  'spiral',
  'lenticular',
  'elliptical',
  'dwarf-elliptical',
  'dwarf-spheroidal',
  'dwarf-irregular',
  'transition',
  'blue-compact',
  'irregular',
  'ultra-faint',
  'unknown',
] as const

export type GalaxyClass = (typeof GALAXY_CLASSES)[number]

/** What people read: `dwarf-spheroidal` is "dwarf spheroidal". */
export function classLabel(key: GalaxyClass): string {
  return key.replace('-', ' ').replace('ultra faint', 'ultra-faint')
}

export const GALAXY_STATUSES = ['confirmed', 'candidate', 'withdrawn'] as const
export type GalaxyStatus = (typeof GALAXY_STATUSES)[number]

/**
 * The class that a published morphological type suggests: a proposal for the curator to correct, not a measurement.
 * Common practice, no source: Magellanic types (Sm, Im) count as irregular, Im among them as dwarf irregular.
 *
 * @param morphology - as published, for example `SA(s)b`, `dSph`, `dIrr/dSph`, `S0 pec`
 * @param stage - Hubble stage T where it is known; breaks ties only
 */
export function classFromMorphology(morphology: string, stage?: number | null): GalaxyClass {
  const type = morphology.trim()
  if (type === '') return classFromStage(stage)
  if (/^u-?fd|ultra-?\s?faint/i.test(type)) return 'ultra-faint'
  if (/dirr.*dsph|dsph.*irr|dt(rans)?\b|transition/i.test(type)) return 'transition'
  if (/^dsph/i.test(type)) return 'dwarf-spheroidal'
  if (/^d(e|s0)/i.test(type)) return 'dwarf-elliptical'
  if (/^bcd|blue\s?compact/i.test(type)) return 'blue-compact'
  if (/^dirr|^di\b/i.test(type)) return 'dwarf-irregular'
  if (/^(c?e)\d?(?![a-z])/i.test(type)) return 'elliptical'
  if (/^s[ab]*(\([rs]+\))?0/i.test(type)) return 'lenticular'
  if (/^i(rr?)?(0|[ab]*(\([rs]+\))?m?)?(\s|$|pec)/i.test(type)) return /m|^irr?$/i.test(type) ? 'dwarf-irregular' : 'irregular'
  if (/^s[ab]*(\([rs]+\))?m/i.test(type)) return 'irregular'
  if (/^s/i.test(type)) return 'spiral'
  return classFromStage(stage)
}

function classFromStage(stage?: number | null): GalaxyClass {
  if (stage == null) return 'unknown'
  if (stage <= -4) return 'elliptical'
  if (stage <= 0) return 'lenticular'
  if (stage <= 8) return 'spiral'
  return stage >= 10 ? 'dwarf-irregular' : 'irregular'
}
