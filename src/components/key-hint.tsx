import { showKeys } from '../lib/keyboard.ts'
import { classNames } from '../lib/class-names.ts'

/** The keys that do the same, drawn as caps. Said by the control's own name, so hidden from readers here. */
export function KeyHint({ keys, className }: { keys: string; className?: string }) {
  return (
    <kbd
      aria-hidden
      className={classNames('inline-block rounded-sm border border-current/45 px-1.5 font-sans text-xs leading-[1.125rem] font-normal whitespace-nowrap', className)}
    >
      {showKeys(keys)}
    </kbd>
  )
}
