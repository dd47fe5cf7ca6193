import type { Member } from './member-marks.tsx'
import { memberWords } from './member-words.ts'

/** Below a picture: the satellite that is pointed at in numbers, or how to point at one. Keeps its height, so that nothing jumps. */
export function Reading({ member }: { member: Member | undefined }) {
  return (
    <p className="figures mt-1 min-h-11 text-sm text-muted" aria-hidden>
      {member ? memberWords(member) : 'Point at a mark, or Tab to the picture and move with the arrows; Enter opens the galaxy.'}
    </p>
  )
}
