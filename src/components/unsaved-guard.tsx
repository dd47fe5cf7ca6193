import { useEffect } from 'react'
import { useBlocker } from 'react-router-dom'
import { Button } from './button.tsx'
import { Dialog } from './dialog.tsx'

export interface UnsavedGuardProps {
  /** Whether there is work that would be lost. */
  when: boolean
  /** What would be lost: "The remark you are writing is not saved." */
  what: string
}

/** Warns before a page with unsaved work is left, by link or by closing the tab. Quiet while everything is saved. */
export function UnsavedGuard({ when, what }: UnsavedGuardProps) {
  const blocker = useBlocker(({ currentLocation, nextLocation }) => when && currentLocation.pathname !== nextLocation.pathname)
  useEffect(() => {
    if (!when) return
    const warn = (event: BeforeUnloadEvent): void => event.preventDefault()
    window.addEventListener('beforeunload', warn)
    return () => window.removeEventListener('beforeunload', warn)
  }, [when])
  if (blocker.state !== 'blocked') return null
  return (
    <Dialog
      title="Leave without saving?"
      role="alertdialog"
      size="small"
      isOpen
      onOpenChange={() => blocker.reset()}
      footer={
        <>
          <Button kind="danger" onPress={() => blocker.proceed()}>
            Leave
          </Button>
          <Button kind="primary" autoFocus onPress={() => blocker.reset()}>
            Stay
          </Button>
        </>
      }
    >
      <p>{what}</p>
    </Dialog>
  )
}
