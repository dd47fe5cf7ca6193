import { isSingleKey, isTyping, matchesKeys, singleKeysSetting } from '../../lib/keyboard.ts'
import { registeredActions, type Action } from './registry.ts'

const dialogIsOpen = (): boolean => document.querySelector('[role=dialog], [role=alertdialog]') !== null

/** Enter and Space belong to the control that has the focus. */
function belongsToControl(event: KeyboardEvent): boolean {
  return (event.key === 'Enter' || event.key === ' ') && event.target instanceof HTMLElement && event.target.closest('a, button, summary, input, [role=button]') !== null
}

/** The action that these keys mean here and now, or none. */
export function actionFor(event: KeyboardEvent, actions: readonly Action[]): Action | undefined {
  if (event.defaultPrevented || belongsToControl(event)) return undefined
  return actions.findLast((action) => {
    if (!action.keys || action.when === false || !matchesKeys(event, action.keys)) return false
    if (!isSingleKey(action.keys)) return true
    return singleKeysSetting.get() === 'on' && !isTyping(event)
  })
}

/** Listens for the keys of all registered actions. Returns the way to stop. */
export function listenForShortcuts(): () => void {
  function onKeyDown(event: KeyboardEvent): void {
    if (event.repeat && !/^[jk]$/.test(event.key)) return
    const action = actionFor(event, registeredActions())
    if (!action || dialogIsOpen()) return
    event.preventDefault()
    action.perform()
  }
  window.addEventListener('keydown', onKeyDown, { capture: true })
  return () => window.removeEventListener('keydown', onKeyDown, { capture: true })
}
