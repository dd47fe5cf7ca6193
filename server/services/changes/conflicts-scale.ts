/** Whether somebody moved the scale under a change of it: anchors field by field, the policy leaf by leaf. */
import type { Knex } from 'knex'
import { anchorFieldLabel, anchorFields, anchorFieldWords, methodsOfField } from '../../../core/scale/anchor-fields.ts'
import { method } from '../../../core/methods.ts'
import { policyLeaves } from '../../../core/scale/policy-leaves.ts'
import type { Clash } from './clash.ts'
import { anchorsNow, policyNow } from './current-scale.ts'
import type { HeldAnchor } from './current-scale.ts'
import { anchorMoves, mergedAnchor, policyMoves } from './scale-merge.ts'
import { changesOf } from './types.ts'
import type { StoredChange, StoredChangeOf } from './types.ts'

export async function clashesOfScale(knex: Knex, changes: readonly StoredChange[]): Promise<Clash[]> {
  const set = changesOf(changes, 'anchor.set')
  const policies = changesOf(changes, 'policy.set')
  const anchors = set.length > 0 ? await anchorsNow(knex) : new Map<string, HeldAnchor>()
  return [...set.flatMap((c) => ofAnchor(c, anchors.get(c.payload.key))), ...ofClaims(set, anchors), ...(policies.length > 0 ? await ofPolicies(knex, policies) : [])]
}

function ofAnchor(c: StoredChangeOf<'anchor.set'>, now: HeldAnchor | undefined): Clash[] {
  const { base } = c
  if (!now || !base || now.versionId === base.versionId) return []
  const [theirs, yours] = [anchorFields(now), anchorFields(c.payload)]
  return anchorMoves(c).flatMap((field): Clash[] => {
    const was = base.fields[field] ?? null
    if (theirs[field] === was || theirs[field] === yours[field]) return []
    return [{
      change: c.id, field: anchorFieldLabel(field), base: was === null ? null : anchorFieldWords(field, was as string | number), theirs: anchorFieldWords(field, theirs[field]),
      yours: anchorFieldWords(field, yours[field]), revision: now.revFrom,
    }]
  })
}

/** A method that would hang on two anchors once all is carried out. */
function ofClaims(set: readonly StoredChangeOf<'anchor.set'>[], anchors: ReadonlyMap<string, HeldAnchor>): Clash[] {
  const after = new Map([...anchors.values()].map((a) => [a.key, { label: a.label, methods: [...a.methods] as string[], revision: a.revFrom }]))
  for (const c of set) {
    const merged = mergedAnchor(c, anchors.get(c.payload.key))
    after.set(c.payload.key, { label: String(merged.label), methods: methodsOfField(String(merged.methods)), revision: anchors.get(c.payload.key)?.revFrom ?? 0 })
  }
  return set.flatMap((c) =>
    methodsOfField(String(anchorFields(c.payload).methods)).flatMap((key): Clash[] => {
      const owner = [...after].find(([other, a]) => other !== c.payload.key && a.methods.includes(key))?.[1]
      if (!owner) return []
      return [{ change: c.id, field: 'Methods', base: null, theirs: `${method(key).label} hangs on ${owner.label}`, yours: `${method(key).label} hangs on ${c.payload.label}`, revision: owner.revision || null }]
    }),
  )
}

async function ofPolicies(knex: Knex, changes: readonly StoredChangeOf<'policy.set'>[]): Promise<Clash[]> {
  const now = await policyNow(knex)
  if (!now) return []
  const theirs = new Map(policyLeaves(now.document).map((l) => [l.path, l]))
  return changes.flatMap((c): Clash[] => {
    const { base } = c
    if (!base || now.versionId === base.versionId) return []
    const moved = policyMoves(c)
    return policyLeaves(c.payload.document).flatMap((yours): Clash[] => {
      const is = theirs.get(yours.path)
      const was = base.fields[yours.path] ?? null
      if (!(yours.path in moved) || (is?.value ?? null) === was || is?.value === yours.value) return []
      return [{ change: c.id, field: yours.label, base: was, theirs: is?.words ?? null, yours: yours.words, revision: now.revFrom }]
    })
  })
}
