import { useEffect, useState, type RefObject } from 'react'
import { paintCanvas } from '../../../core/figure/paint-canvas.ts'
import type { Scene } from '../../../core/figure/scene.ts'

/** Device pixels a CSS pixel, kept true when the window moves to another screen or is zoomed. */
function useDevicePixels(): number {
  const [ratio, setRatio] = useState(() => window.devicePixelRatio)
  useEffect(() => {
    const query = window.matchMedia(`(resolution: ${ratio}dppx)`)
    const follow = (): void => setRatio(window.devicePixelRatio)
    query.addEventListener('change', follow)
    return () => query.removeEventListener('change', follow)
  }, [ratio])
  return ratio
}

export interface CanvasPainting {
  scene: Scene | null
  /** CSS width of the canvas, px. */
  width: number
  /** Draws the scene's own background too. */
  background: boolean
  /** The fonts are there. */
  hasFonts: boolean
}

/** Paints a scene on a canvas, at the device's own resolution, whenever anything of it changes. */
export function usePaintedCanvas(canvas: RefObject<HTMLCanvasElement | null>, { scene, width, background, hasFonts }: CanvasPainting): void {
  const ratio = useDevicePixels()
  useEffect(() => {
    const target = canvas.current
    const ink = target?.getContext('2d')
    if (!target || !ink || !scene) return
    const pixels = Math.round(width * ratio)
    const pxPerMm = pixels / scene.widthMm
    target.width = pixels
    target.height = Math.round(scene.heightMm * pxPerMm)
    paintCanvas(scene, ink, pxPerMm, background)
  }, [canvas, scene, width, ratio, background, hasFonts])
}
