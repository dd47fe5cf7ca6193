import { useEffect, useState } from 'react'

export interface SkeletonProps {
  /** So many lines of text ... */
  lines?: number
  /** ... or one block of this height in px. */
  height?: number
  label?: string
}

const WIDTHS = ['92%', '78%', '85%', '64%', '88%', '71%']

/** A stand-in the size of what comes. Its place is kept from the start; it is drawn only when the wait is longer than 300 ms. */
export function Skeleton({ lines, height, label = 'Loading' }: SkeletonProps) {
  const [shown, setShown] = useState(false)
  useEffect(() => {
    const timer = setTimeout(() => setShown(true), 300)
    return () => clearTimeout(timer)
  }, [])
  const look = shown ? 'animate-pulse bg-well' : 'bg-transparent'
  return (
    <div role="status">
      <span className="sr-only">{shown ? `${label} …` : ''}</span>
      {height !== undefined ? (
        <div className={`rounded-lg ${look}`} style={{ height }} />
      ) : (
        Array.from({ length: lines ?? 3 }, (_, line) => (
          <div key={line} className="flex h-8 items-center">
            <div className={`h-3.5 rounded-sm ${look}`} style={{ width: WIDTHS[line % WIDTHS.length] }} />
          </div>
        ))
      )}
    </div>
  )
}
