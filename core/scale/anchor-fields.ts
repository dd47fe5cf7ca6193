/** The fields of an anchor: their bounds, their names and their values in words. */
import type { Anchor } from '../catalogue/types.ts'
import { numberWords } from '../formats/measure-words.ts'
import { METHODS } from '../methods.ts'
import { GAP } from '../spaces.ts'

export const ANCHOR_KINDS = ['modulus', 'absolute-magnitude'] as const satisfies readonly Anchor['kind'][]

/** Values outside are slips, mag: no distance method hangs on a galaxy beyond 40 mag, and no candle is brighter than a supernova. */
export const ANCHOR_BOUNDS: Readonly<Record<Anchor['kind'], readonly [number, number]>> = { 'modulus': [5, 40], 'absolute-magnitude': [-22, 5] }

/** Why a value is refused, and what to look at. */
export function anchorBoundsWords(kind: Anchor['kind']): string {
  const [lo, hi] = ANCHOR_BOUNDS[kind]
  return `${kind === 'modulus' ? 'A distance modulus' : 'The absolute magnitude of a candle'} lies between ${numberWords(lo, 0)} and ${numberWords(hi, 0)}${GAP}mag. Check the value and its sign.`
}

/** "distance modulus", "absolute magnitude" */
export function anchorKindWords(kind: Anchor['kind']): string {
  return kind === 'modulus' ? 'distance modulus' : 'absolute magnitude'
}

/** What of an anchor can move: its key and its kind stay. */
export const ANCHOR_FIELDS = ['label', 'methods', 'value', 'err', 'source'] as const
export type AnchorField = (typeof ANCHOR_FIELDS)[number]

/** `methods`: keys in the order of the alphabet, separated by blanks, so that equal sets are equal texts. */
export type AnchorFields = Record<AnchorField, string | number>

const LABELS: Readonly<Record<AnchorField, string>> = { label: 'Label', methods: 'Methods', value: 'Value', err: 'Error', source: 'Source' }

/** The fields of an anchor in a form that compares. */
export function anchorFields(anchor: Omit<Anchor, 'key' | 'kind'>): AnchorFields {
  return { label: anchor.label, methods: [...anchor.methods].sort().join(' '), value: anchor.value, err: anchor.err, source: anchor.source }
}

/** `err` is "Error". */
export function anchorFieldLabel(field: AnchorField): string {
  return LABELS[field]
}

/** Keys of methods out of the text of a field. */
export function methodsOfField(text: string): string[] {
  return text === '' ? [] : text.split(' ')
}

/** A field in words: `−4.049 mag`, `Cepheids, Miras`. */
export function anchorFieldWords(field: AnchorField, value: string | number): string {
  switch (field) {
    case 'value':
    case 'err':
      return `${numberWords(Number(value), 3)}${GAP}mag`
    case 'methods':
      return METHODS.filter((m) => methodsOfField(String(value)).includes(m.key)).map((m) => m.label).join(', ') || 'none'
    default:
      return String(value)
  }
}
