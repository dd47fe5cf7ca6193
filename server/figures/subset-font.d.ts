declare module 'subset-font' {
  interface SubsetOptions {
    targetFormat?: 'truetype' | 'woff' | 'woff2'
    variationAxes?: Record<string, number>
    keepFeatures?: string[]
  }
  /** A font with only the glyphs of a text, its layout features kept. */
  export default function subsetFont(font: Uint8Array, text: string, options?: SubsetOptions): Promise<Buffer>
}
