import type { GalaxyAnswer } from '../../../core/schema/catalogue.ts'
import { overrideSubjectWords, type OverrideSubject } from '../../../core/schema/changes.ts'
import { Link } from '../../components/link.tsx'
import { overrideAddress } from './change-links.ts'

interface OverrideLinksProps {
  galaxy: Pick<GalaxyAnswer, 'slug' | 'designation'>
  about: OverrideSubject
  /** Whether an override is in force. */
  isOverridden: boolean
}

/** For curators: decide against the policy, or let it decide again. */
export function OverrideLinks({ galaxy, about, isOverridden }: OverrideLinksProps) {
  const words = overrideSubjectWords(about)
  return (
    <span data-no-print className="inline-flex flex-wrap gap-x-4">
      <Link to={overrideAddress(galaxy, 'override.set', about)} aria-label={`${isOverridden ? 'Change the override of' : 'Override'} the ${words}`}>{isOverridden ? 'Change the override' : 'Override'}</Link>
      {isOverridden && <Link to={overrideAddress(galaxy, 'override.clear', about)} aria-label={`Clear the override of the ${words}`}>Clear it</Link>}
    </span>
  )
}
