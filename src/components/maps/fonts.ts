/** The fonts that figures are lettered with, fetched before a canvas draws with them. */
import '@fontsource-variable/source-sans-3/wght-italic.css'
import '../../styles/figure-fonts.css'
import { useSyncExternalStore } from 'react'
import { FACES } from '../../../core/figure/scene.ts'
import { canvasFont } from '../../../core/figure/paint-canvas.ts'

const SAMPLE_PX = 16

let areReady = false
let asked = false
const listeners = new Set<() => void>()

function ask(): void {
  if (asked) return
  asked = true
  const done = (): void => {
    areReady = true
    for (const listener of listeners) listener()
  }
  // A font that cannot be had is stood in for by the next of its family.
  Promise.allSettled(FACES.map((face) => document.fonts.load(canvasFont(face, SAMPLE_PX)))).then(done, done)
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener)
  ask()
  return () => listeners.delete(listener)
}

/** Whether the fonts are there; fetches them. */
export function useMapFonts(): boolean {
  return useSyncExternalStore(subscribe, () => areReady)
}
