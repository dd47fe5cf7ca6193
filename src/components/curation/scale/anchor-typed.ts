/** An anchor as it is typed into a form. */
import type { Anchor } from '../../../../core/catalogue/types.ts'
import { METHOD_KEYS, type MethodKey } from '../../../../core/methods.ts'
import { changePayloadSchemas, type ChangePayload } from '../../../../core/schema/changes.ts'
import { asTyped, typedNumber } from '../../../lib/typed-number.ts'

export interface TypedAnchor {
  key: string
  label: string
  kind: Anchor['kind']
  methods: string[]
  value: string
  err: string
  source: string
}

export const NEW_ANCHOR: TypedAnchor = { key: '', label: '', kind: 'modulus', methods: [], value: '', err: '', source: '' }

export function typedAnchor(a: Pick<Anchor, 'key' | 'label' | 'kind' | 'methods' | 'value' | 'err' | 'source'>): TypedAnchor {
  return { key: a.key, label: a.label, kind: a.kind, methods: [...a.methods], value: asTyped(a.value), err: asTyped(a.err), source: a.source }
}

/** "Mira zero point" is mira-zero-point. */
export function keyOfLabel(label: string): string {
  return label.toLowerCase().normalize('NFKD').replace(/[^a-z0-9]+/g, '-').replace(/^-+|-+$/g, '').slice(0, 60)
}

function freeKey(label: string, taken: readonly string[]): string {
  const stem = keyOfLabel(label) || 'anchor'
  let key = stem
  for (let n = 2; taken.includes(key); n += 1) key = `${stem}-${n}`
  return key
}

/** Reads the form. @param taken - keys of the anchors there are: one that is added gets another, from its label */
export function readAnchor(typed: TypedAnchor, reason: string, taken: readonly string[]) {
  return changePayloadSchemas['anchor.set'].safeParse({
    ...typed,
    key: typed.key || freeKey(typed.label, taken),
    methods: typed.methods.filter(isMethod),
    value: typedNumber(typed.value) ?? undefined,
    err: typedNumber(typed.err) ?? undefined,
    reason,
  })
}

const isMethod = (key: string): key is MethodKey => METHOD_KEYS.includes(key as MethodKey)

/** Whether what is typed differs from what holds; a field that cannot be read differs. */
export function anchorDiffers(typed: TypedAnchor, held: Parameters<typeof typedAnchor>[0]): boolean {
  const same = (text: string, value: number): boolean => typedNumber(text) === value
  return (
    typed.label.trim() !== held.label || typed.source.trim() !== held.source || !same(typed.value, held.value) || !same(typed.err, held.err) ||
    [...typed.methods].sort().join() !== [...held.methods].sort().join()
  )
}

export type AnchorPayload = ChangePayload<'anchor.set'>
