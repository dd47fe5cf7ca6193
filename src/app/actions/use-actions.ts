import { useEffect, useState, useSyncExternalStore } from 'react'
import { dropActions, putActions, registeredActions, subscribeActions, type Action } from './registry.ts'

export type { Action } from './registry.ts'

/** Offers these actions while the calling component is shown. The list may be made anew on every render. */
export function useActions(actions: readonly Action[]): void {
  const [owner] = useState(() => Symbol('actions'))
  useEffect(() => putActions(owner, actions))
  useEffect(() => () => dropActions(owner), [owner])
}

/** The actions that can be done now, kept true. */
export function useAvailableActions(): readonly Action[] {
  const actions = useSyncExternalStore(subscribeActions, registeredActions)
  return actions.filter((action) => action.when !== false)
}
