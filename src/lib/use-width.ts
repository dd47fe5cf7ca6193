import { useEffect, useRef, useState, type RefObject } from 'react'

/** The width of an element in px, kept true; `initial` until it has been measured. */
export function useWidth<Element extends HTMLElement>(initial: number): [RefObject<Element | null>, number] {
  const element = useRef<Element>(null)
  const [width, setWidth] = useState(initial)
  useEffect(() => {
    const target = element.current
    if (!target) return
    const observer = new ResizeObserver((entries) => {
      const measured = entries[0]?.contentRect.width
      if (measured) setWidth(Math.round(measured))
    })
    observer.observe(target)
    return () => observer.disconnect()
  }, [])
  return [element, width]
}
