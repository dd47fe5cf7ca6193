/** Fonts inside of an SVG: only the letters it has, so that it looks the same wherever it is opened. */
import subsetFont from 'subset-font'
import { FACE_STYLES } from '../../core/figure/paint-svg.ts'
import { textsOf, type Face, type Scene } from '../../core/figure/scene.ts'
import { fontBytes } from './fonts.ts'

/** @font-face rules for the texts of a scene. */
export async function inlineFonts(scene: Scene): Promise<string> {
  const letters = new Map<Face, Set<string>>()
  for (const { face, text } of textsOf(scene.marks)) {
    const known = letters.get(face) ?? new Set<string>()
    for (const letter of text) known.add(letter)
    letters.set(face, known)
  }
  const rules = await Promise.all(
    [...letters].map(async ([face, used]) => {
      const bytes = await subsetFont(await fontBytes(face), [...used].sort().join(''), { targetFormat: 'woff2' })
      const { family, weight, italic } = FACE_STYLES[face]
      return `@font-face{font-family:'${family}';font-weight:${weight};font-style:${italic ? 'italic' : 'normal'};src:url(data:font/woff2;base64,${bytes.toString('base64')}) format('woff2')}`
    }),
  )
  return rules.join('')
}
