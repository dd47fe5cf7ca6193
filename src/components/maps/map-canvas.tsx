import { useEffect, useId, useLayoutEffect, useMemo, useRef, useState, useSyncExternalStore, type KeyboardEvent, type PointerEvent } from 'react'
import type { FigureGalaxy } from '../../../core/figure/galaxy.ts'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import { sceneOf } from '../../../core/figure/scene-of.ts'
import { hitAt, type Hit } from '../../../core/figure/scene.ts'
import { onThemeChange, shownTheme } from '../../lib/theme.ts'
import { announce } from '../toast.tsx'
import { useMapFonts } from './fonts.ts'
import { HoverCard, hoverWords } from './hover-card.tsx'
import { usePaintedCanvas } from './use-canvas.ts'
import { directionOf, nextHit } from './walk.ts'

export interface MapCanvasProps {
  galaxies: readonly FigureGalaxy[]
  /** Which map; its width and theme are the page's. */
  recipe: FigureRecipe
  /** Slug of the galaxy that is chosen. */
  selected: string | null
  onSelect: (slug: string | null) => void
  /** Enter or double click. */
  onOpen?: (slug: string) => void
  /** Names the map among others on the page. */
  label: string
}

/** Chosen so that letters of a figure are read on a screen as those of the page are. */
const PX_PER_MM = 5.6
const LEAST_MM = 56
const MOUSE_REACH_PX = 4
const FINGER_REACH_PX = 14

/** A map of galaxies, drawn from the very scene that is exported: hover, choose, walk by arrow keys. */
export function MapCanvas({ galaxies, recipe, selected, onSelect, onOpen, label }: MapCanvasProps) {
  const frame = useRef<HTMLDivElement>(null)
  const canvas = useRef<HTMLCanvasElement>(null)
  const [width, setWidth] = useState(0)
  const [hovered, setHovered] = useState<Hit | null>(null)
  const theme = useSyncExternalStore(onThemeChange, shownTheme)
  const hasFonts = useMapFonts()
  const helpId = useId()

  useLayoutEffect(() => {
    const target = frame.current
    if (!target) return
    const measure = (): void => setWidth(Math.round(target.getBoundingClientRect().width))
    measure()
    const observer = new ResizeObserver(measure)
    observer.observe(target)
    return () => observer.disconnect()
  }, [])

  const bySlug = useMemo(() => new Map(galaxies.map((galaxy) => [galaxy.slug, galaxy])), [galaxies])
  const scene = useMemo(() => {
    const shown: FigureRecipe = { ...recipe, theme, widthMm: Math.max(LEAST_MM, (width || 960) / PX_PER_MM) }
    return sceneOf(galaxies, shown, { bare: true })
  }, [galaxies, recipe, theme, width])
  usePaintedCanvas(canvas, { scene: width > 0 ? scene : null, width, background: false, hasFonts })

  const scale = width / scene.widthMm
  const chosen = selected === null ? null : (scene.hits.find((hit) => hit.slug === selected) ?? null)
  const pointed = hovered && scene.hits.find((hit) => hit.id === hovered.id)

  const hitUnder = (event: PointerEvent | React.MouseEvent, reachPx: number): Hit | null => {
    const box = frame.current?.getBoundingClientRect()
    if (!box || scale === 0) return null
    return hitAt(scene.hits, (event.clientX - box.left) / scale, (event.clientY - box.top) / scale, reachPx / scale)
  }
  // Keys may come faster than the page's state follows: the walk goes on from where it has got to.
  const walkedTo = useRef(selected)
  useEffect(() => {
    walkedTo.current = selected
  }, [selected])
  const choose = (hit: Hit | null): void => {
    walkedTo.current = hit?.slug ?? null
    onSelect(hit?.slug ?? null)
    const galaxy = hit && bySlug.get(hit.slug)
    if (galaxy) announce(hoverWords(galaxy))
  }
  function onKeyDown(event: KeyboardEvent): void {
    const direction = directionOf(event.key)
    const brightest = scene.hits[0] ?? null
    const from = scene.hits.find((hit) => hit.slug === walkedTo.current)
    if (direction) choose(from ? (nextHit(scene.hits, from, direction) ?? from) : brightest)
    else if (event.key === 'Home') choose(brightest)
    else if (event.key === 'Enter' && from) onOpen?.(from.slug)
    else if (event.key === 'Escape' && from) choose(null)
    else return
    event.preventDefault()
  }

  const card = pointed && bySlug.get(pointed.slug)
  return (
    <div
      ref={frame}
      role="application"
      aria-roledescription="map"
      aria-label={label}
      aria-describedby={helpId}
      tabIndex={0}
      onKeyDown={onKeyDown}
      onPointerMove={(event) => setHovered(event.pointerType === 'touch' ? null : hitUnder(event, MOUSE_REACH_PX))}
      onPointerLeave={() => setHovered(null)}
      onClick={(event) => choose(hitUnder(event, event.nativeEvent instanceof window.PointerEvent && event.nativeEvent.pointerType === 'touch' ? FINGER_REACH_PX : MOUSE_REACH_PX))}
      onDoubleClick={(event) => {
        const hit = hitUnder(event, MOUSE_REACH_PX)
        if (hit) onOpen?.(hit.slug)
      }}
      className={hovered ? 'relative cursor-pointer rounded-sm' : 'relative rounded-sm'}
      style={{ aspectRatio: `${scene.widthMm} / ${scene.heightMm}` }}
    >
      <canvas ref={canvas} aria-hidden className="absolute inset-0 size-full" />
      <svg aria-hidden viewBox={`0 0 ${scene.widthMm} ${scene.heightMm}`} className="pointer-events-none absolute inset-0 size-full">
        {pointed && <Ring hit={pointed} scale={scale} className="stroke-ink" />}
        {chosen && <Ring hit={chosen} scale={scale} className="stroke-accent" />}
      </svg>
      {pointed && card && <HoverCard galaxy={card} left={pointed.x * scale} top={pointed.y * scale} width={width} />}
      <p id={helpId} className="sr-only">
        {`${scene.title}. ${scene.description} Arrow keys go from galaxy to galaxy, Home to the brightest, Enter opens the one chosen, Escape lets it go.`}
      </p>
    </div>
  )
}

const RING_ROOM_PX = 4

function Ring({ hit, scale, className }: { hit: Hit; scale: number; className: string }) {
  return <circle cx={hit.x} cy={hit.y} r={hit.radius + RING_ROOM_PX / (scale || 1)} fill="none" strokeWidth={2 / (scale || 1)} className={className} />
}
