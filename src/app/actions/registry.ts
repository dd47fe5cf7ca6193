/**
 * What can be done now, in one list. Menu, palette, shortcut and help all read it, so they cannot disagree.
 */
export interface Action {
  /** Unique: `galaxies.copy`. A later registration of the same name stands in for an earlier one. */
  name: string
  /** As in the palette and the help: "Approve". */
  label: string
  /** As in src/lib/keyboard.ts: `a`, `Mod+k`, `?`. */
  keys?: string
  /** Heading in the help and the palette: "Table", "Review". */
  group?: string
  /** Other words that find it in the palette. */
  also?: string
  /** False while it cannot be done. */
  when?: boolean
  /** Left out of the palette: j and k, for example. */
  keysOnly?: boolean
  perform: () => void
}

const sets = new Map<symbol, readonly Action[]>()
const listeners = new Set<() => void>()
let snapshot: readonly Action[] = []

const signatureOf = (actions: readonly Action[]): string => JSON.stringify(actions.map((a) => [a.name, a.label, a.keys, a.group, a.also, a.when, a.keysOnly]))

function rebuild(): void {
  const byName = new Map<string, Action>()
  for (const actions of sets.values()) for (const action of actions) byName.set(action.name, action)
  snapshot = [...byName.values()]
}

/** Puts or replaces the actions of one owner. Listeners hear of it only when something visible changed. */
export function putActions(owner: symbol, actions: readonly Action[]): void {
  const before = sets.get(owner)
  sets.set(owner, actions)
  rebuild()
  if (!before || signatureOf(before) !== signatureOf(actions)) for (const listener of listeners) listener()
}

export function dropActions(owner: symbol): void {
  sets.delete(owner)
  rebuild()
  for (const listener of listeners) listener()
}

export function subscribeActions(listener: () => void): () => void {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

/** Every registered action, also those that cannot be done now (`when` is false). */
export function registeredActions(): readonly Action[] {
  return snapshot
}

/** Does the action of this name, if it is there and can be done. */
export function performAction(name: string): boolean {
  const action = snapshot.find((candidate) => candidate.name === name)
  if (!action || action.when === false) return false
  action.perform()
  return true
}
