import { useSyncExternalStore } from 'react'

/**
 * A small choice kept on this device (theme, row height, single-letter keys), shared by every component that reads it and
 * by other tabs. Where storage is forbidden it lasts as long as the page.
 */
export interface LocalSetting<Value extends string> {
  get(): Value
  set(value: Value): void
  subscribe(listener: () => void): () => void
}

/**
 * @param key - without the prefix `vicinage.`
 * @param allowed - every value it may have; the first is the default, and stands in for anything unreadable
 */
export function localSetting<Value extends string>(key: string, allowed: readonly [Value, ...Value[]]): LocalSetting<Value> {
  const storageKey = `vicinage.${key}`
  const listeners = new Set<() => void>()
  const accept = (text: string | null): Value => allowed.find((value) => value === text) ?? allowed[0]
  let current: Value = allowed[0]
  try {
    current = accept(localStorage.getItem(storageKey))
  } catch {
    current = allowed[0]
  }
  const tell = (): void => {
    for (const listener of listeners) listener()
  }
  if (typeof window !== 'undefined') {
    window.addEventListener('storage', (event) => {
      if (event.key !== storageKey) return
      current = accept(event.newValue)
      tell()
    })
  }
  return {
    get: () => current,
    set(value) {
      current = value
      try {
        localStorage.setItem(storageKey, value)
      } catch {
        // Kept in memory only: the choice holds until the page is closed.
      }
      tell()
    },
    subscribe(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
  }
}

/** The setting's value, kept true, and its setter. */
export function useLocalSetting<Value extends string>(setting: LocalSetting<Value>): [Value, (value: Value) => void] {
  return [useSyncExternalStore(setting.subscribe, setting.get, setting.get), setting.set]
}
