import type { Permission } from '../../core/permissions.ts'
import { paths } from '../paths.ts'

export interface PageEntry {
  label: string
  path: string
  /** In the palette, below the label. */
  hint: string
  /** Where it stands in the top bar. */
  bar?: 'main' | 'desk'
  /** The first parts of addresses for which it is the current one. */
  covers: readonly string[]
  /** Shown only to those who may. */
  needs?: Permission
}

/** The pages that the top bar and the palette lead to, in their order. */
export const PAGES: readonly PageEntry[] = [
  { label: 'Atlas', path: paths.sky, hint: 'the whole sky, in three frames', bar: 'main', covers: ['/atlas'] },
  { label: 'Galaxies', path: paths.galaxies, hint: 'the catalogue as a table', bar: 'main', covers: ['/galaxies'] },
  { label: 'Hosts', path: paths.hosts, hint: 'systems and their satellites', bar: 'main', covers: ['/hosts'] },
  { label: 'Figures', path: paths.figures, hint: 'maps to print', bar: 'main', covers: ['/figures'] },
  { label: 'Releases', path: paths.releases, hint: 'download and cite', bar: 'main', covers: ['/releases'] },
  { label: 'Submissions', path: paths.submissions, hint: 'drafts and what became of them', bar: 'desk', covers: ['/submissions', '/import'], needs: 'submission.read' },
  { label: 'Review', path: paths.review, hint: 'what waits for a decision', bar: 'desk', covers: ['/review'], needs: 'submission.review' },
  { label: 'Scale', path: paths.scale, hint: 'anchors, systematics, policy', bar: 'desk', covers: ['/scale'], needs: 'submission.read' },
  { label: 'At a glance', path: paths.home, hint: 'the first page', covers: [] },
  { label: 'Supergalactic plane', path: paths.plane, hint: 'the neighbourhood in three dimensions', covers: [] },
  { label: 'Sources', path: paths.sources, hint: 'the literature behind the values', covers: ['/sources'] },
  { label: 'Import a table', path: paths.imports, hint: 'a paper’s whole table at once', covers: [], needs: 'import.write' },
  { label: 'New submission', path: paths.newSubmission, hint: 'one measurement in under a minute', covers: [], needs: 'submission.write' },
]

export function isCurrentPage(page: PageEntry, pathname: string): boolean {
  return page.covers.some((start) => pathname === start || pathname.startsWith(`${start}/`))
}
