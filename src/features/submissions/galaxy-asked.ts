import { useSearchParams } from 'react-router-dom'
import type { PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'

/** The galaxy that the link to this page names, if it does. */
export function useGalaxyAsked(): PickedGalaxy | null {
  const [search] = useSearchParams()
  const slug = search.get('galaxy')
  return slug ? { slug, name: search.get('name') ?? slug } : null
}
