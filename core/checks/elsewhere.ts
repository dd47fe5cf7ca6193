import { quantity } from '../quantities.ts'
import { labelInSentence } from '../formats/measure-words.ts'
import type { MeasurementCheck } from './check.ts'

/** The same source gives the very same value for another galaxy: one of the two was probably entered in the wrong place. */
export const elsewhere: MeasurementCheck = ({ measurement: m }, { elsewhere: galaxies, galaxy, sourceLabel }) => {
  const [first] = galaxies
  if (first === undefined) return null
  const others = galaxies.length > 1 ? `${first} and ${galaxies.length - 1} more` : first
  return {
    check: 'elsewhere', level: 'warn',
    sentence: `${sourceLabel} has the very same ${labelInSentence(quantity(m.quantity).label)}, error and all, for ${others}. Is this row that of ${galaxy}?`,
  }
}
