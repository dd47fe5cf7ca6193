/** The anchors that a new catalogue starts with. */
import type { Anchor } from '../catalogue/types.ts'

export const DEFAULT_ANCHORS: readonly Anchor[] = [
  {
    key: 'lmc-modulus',
    label: 'LMC distance modulus',
    kind: 'modulus',
    methods: ['cepheids', 'miras', 'rr-lyrae', 'red-clump'],
    // 49.59 kpc ± 0.09 ± 0.54 is Pietrzyński et al. 2019, Nature 567, 200; the modulus 18.477 ± 0.004 ± 0.026 of it from memory.
    value: 18.477,
    err: 0.026,
    source: 'Pietrzyński et al. 2019, Nature 567, 200',
  },
  {
    key: 'trgb-absolute-i',
    label: 'TRGB absolute I magnitude',
    kind: 'absolute-magnitude',
    methods: ['trgb'],
    // −4.049 ± 0.015 (stat) ± 0.035 (sys): Freedman 2021, ApJ 919, 16, from memory; parts added in quadrature.
    value: -4.049,
    err: 0.038,
    source: 'Freedman 2021, ApJ 919, 16',
  },
]

/** The anchor that a published name means (`LMC modulus`, `lmc-modulus`), or undefined. */
export function anchorNamed<A extends Pick<Anchor, 'key' | 'label'>>(anchors: readonly A[], name: string): A | undefined {
  const words = simplify(name)
  if (words.length === 0) return undefined
  return anchors.find((a) => a.key === name) ?? anchors.find((a) => words.every((w) => simplify(`${a.key} ${a.label}`).includes(w)))
}

function simplify(text: string): string[] {
  return text.toLowerCase().match(/[a-z0-9]+/g) ?? []
}
