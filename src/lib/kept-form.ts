import { useCallback, useEffect, useRef, useState } from 'react'

const PREFIX = 'vicinage.kept.'
const DELAY_MS = 400

/**
 * What is being typed into a form, kept on this device until the server has taken it: a reload, a lost connection or an ended session loses
 * nothing.
 *
 * @param key - names the form, such as `submission.12.measurement`
 * @returns the value typed last time (or null), and what to call with each new value (null: forget, since the server has it)
 */
export function useKeptForm<Value>(key: string): { kept: Value | null; keep: (value: Value | null) => void } {
  const [kept] = useState(() => read<Value>(key))
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined)
  const keep = useCallback(
    (value: Value | null) => {
      clearTimeout(timer.current)
      if (value === null) return forget(key)
      timer.current = setTimeout(() => write(key, value), DELAY_MS)
    },
    [key],
  )
  useEffect(() => () => clearTimeout(timer.current), [])
  return { kept, keep }
}

function read<Value>(key: string): Value | null {
  try {
    const text = localStorage.getItem(PREFIX + key)
    return text === null ? null : (JSON.parse(text) as Value)
  } catch {
    return null
  }
}

function write(key: string, value: unknown): void {
  try {
    localStorage.setItem(PREFIX + key, JSON.stringify(value))
  } catch {
    // Storage is full or forbidden: the form still holds what was typed.
  }
}

function forget(key: string): void {
  try {
    localStorage.removeItem(PREFIX + key)
  } catch {
    // Nothing was kept.
  }
}
