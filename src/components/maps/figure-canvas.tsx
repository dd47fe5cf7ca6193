import { useMemo, useRef } from 'react'
import type { FigureGalaxy } from '../../../core/figure/galaxy.ts'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import { sceneOf } from '../../../core/figure/scene-of.ts'
import { useWidth } from '../../lib/use-width.ts'
import { useMapFonts } from './fonts.ts'
import { usePaintedCanvas } from './use-canvas.ts'

export interface FigureCanvasProps {
  galaxies: readonly FigureGalaxy[]
  recipe: FigureRecipe
  /** Part of the credit line: release or revision in words. */
  releaseLabel: string
  className?: string
}

/** A figure as it will be exported: title, legend, caption and credit with it. */
export function FigureCanvas({ galaxies, recipe, releaseLabel, className }: FigureCanvasProps) {
  const [frame, width] = useWidth<HTMLDivElement>(480)
  const canvas = useRef<HTMLCanvasElement>(null)
  const hasFonts = useMapFonts()
  const scene = useMemo(() => sceneOf(galaxies, recipe, { releaseLabel }), [galaxies, recipe, releaseLabel])
  usePaintedCanvas(canvas, { scene, width, background: true, hasFonts })
  return (
    <div ref={frame} className={className}>
      <canvas ref={canvas} role="img" aria-label={`${scene.title}. ${scene.description}`} className="block w-full" style={{ aspectRatio: `${scene.widthMm} / ${scene.heightMm}` }} />
    </div>
  )
}
