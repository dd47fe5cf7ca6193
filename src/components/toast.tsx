import { X } from 'lucide-react'
import { useSyncExternalStore } from 'react'
import { classNames } from '../lib/class-names.ts'
import { StateShape, type BadgeShape } from './badge.tsx'
import { Button } from './button.tsx'
import { IconButton } from './icon-button.tsx'

export interface NoticeOptions {
  tone?: 'plain' | 'good' | 'caution' | 'stop'
  /** For example "Undo". */
  action?: { label: string; onPress: () => void }
  /** How long it stays: 6 s, with an action 10 s; 0 is until closed. */
  seconds?: number
}

interface Notice extends NoticeOptions {
  id: number
  message: string
}

interface State {
  notices: readonly Notice[]
  spoken: string
}

let state: State = { notices: [], spoken: '' }
let nextId = 1
const listeners = new Set<() => void>()

function put(next: State): void {
  state = next
  for (const listener of listeners) listener()
}

function close(id: number): void {
  put({ ...state, notices: state.notices.filter((notice) => notice.id !== id) })
}

/** Says something that has happened, on the screen and to readers, without moving the focus. Returns the way to take it back. */
export function notify(message: string, options: NoticeOptions = {}): () => void {
  const id = nextId
  nextId += 1
  put({ notices: [...state.notices.slice(-2), { ...options, id, message }], spoken: message })
  const seconds = options.seconds ?? (options.action ? 10 : 6)
  if (seconds > 0) setTimeout(() => close(id), seconds * 1000)
  return () => close(id)
}

/** Says something to screen readers only: counts, "Saved 14:02". The same words twice are said twice. */
export function announce(message: string): void {
  put({ ...state, spoken: state.spoken === message ? `${message}\u00a0` : message })
}

const TONES: Record<NonNullable<NoticeOptions['tone']>, { look: string; shape: BadgeShape }> = {
  plain: { look: 'text-ink', shape: 'dot' },
  good: { look: 'text-good', shape: 'tick' },
  caution: { look: 'text-caution', shape: 'mark' },
  stop: { look: 'text-stop', shape: 'cross' },
}

/** Where notices appear and are said; once, in the shell. */
export function ToastRegion() {
  const { notices, spoken } = useSyncExternalStore(
    (listener) => {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    () => state,
  )
  return (
    <>
      <div role="status" aria-live="polite" className="sr-only">
        {spoken}
      </div>
      <section aria-label="Notices" data-no-print className="pointer-events-none fixed right-4 bottom-4 left-4 z-40 flex flex-col items-end gap-2 sm:left-auto">
        {notices.map((notice) => {
          const tone = TONES[notice.tone ?? 'plain']
          return (
            <div key={notice.id} className="pointer-events-auto flex max-w-md items-center gap-3 rounded-md border border-line bg-sheet py-2 pr-2 pl-4 text-ink shadow-float">
              <span className={classNames('flex', tone.look)}>
                <StateShape shape={tone.shape} />
              </span>
              <span className="flex-1">{notice.message}</span>
              {notice.action && (
                <Button
                  size="small"
                  onPress={() => {
                    notice.action?.onPress()
                    close(notice.id)
                  }}
                >
                  {notice.action.label}
                </Button>
              )}
              <IconButton label="Close this notice" size="small" icon={<X size={14} aria-hidden />} onPress={() => close(notice.id)} />
            </div>
          )
        })}
      </section>
    </>
  )
}
