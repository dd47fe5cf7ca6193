import { useRef, useState, type ReactNode } from 'react'
import { savePng, saveSvg } from '../lib/picture-export.ts'
import { Button } from './button.tsx'
import { notify } from './toast.tsx'

export interface PlotFrameProps {
  title: string
  /** Above the downloads, where they should say more than the page around them does: whose picture it is. */
  savedTitle?: string
  /** What the picture shows, in sentences: read instead of it. */
  alt: string
  /** Name of the downloads, without ending: `ostrel-ix-distance`. */
  fileName: string
  /** One `<svg>`; give it `aria-hidden`, the frame speaks for it. */
  children: ReactNode
  /** Words below the picture. */
  note?: ReactNode
  /** The same in numbers, shown in the picture's place on demand. */
  table?: ReactNode
  level?: 2 | 3
  /** Links or buttons stand in the picture, so that it is read as a group of them. */
  holdsControls?: boolean
}

/** What every picture has: title, text alternative, its numbers, downloads. */
export function PlotFrame({ title, savedTitle = title, alt, fileName, children, note, table, level = 2, holdsControls }: PlotFrameProps) {
  const picture = useRef<HTMLDivElement>(null)
  const [asTable, setAsTable] = useState(false)
  const Heading = level === 2 ? 'h2' : 'h3'

  function save(kind: 'svg' | 'png'): void {
    const svg = picture.current?.querySelector('svg')
    if (!svg) return
    const saving = kind === 'svg' ? saveSvg(svg, fileName, savedTitle) : savePng(svg, fileName, savedTitle)
    saving.catch((error: unknown) => notify(`The picture was not saved: ${error instanceof Error ? error.message : 'unknown reason'}. Nothing else is lost; try the other format.`, { tone: 'stop' }))
  }

  return (
    <figure className="min-w-0">
      <figcaption className="mb-3 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <Heading className="text-lg">{title}</Heading>
        <span data-no-print className="flex items-center gap-1">
          {(['svg', 'png'] as const).map((kind) => (
            <Button key={kind} kind="plain" size="small" isDisabled={asTable} aria-label={`Download “${title}” as ${kind.toUpperCase()}`} onPress={() => save(kind)} className="px-2! text-muted!">
              {kind.toUpperCase()}
            </Button>
          ))}
          {table && (
            <Button kind="plain" size="small" onPress={() => setAsTable(!asTable)} className="px-2! text-muted!">
              {asTable ? 'picture' : 'table'}
            </Button>
          )}
        </span>
      </figcaption>
      {asTable ? (
        table
      ) : (
        <div ref={picture} role={holdsControls ? 'group' : 'img'} aria-label={alt}>
          {children}
        </div>
      )}
      {note && <div className="prose-measure mt-3">{note}</div>}
    </figure>
  )
}
