import { useState } from 'react'
import { changePayloadSchemas } from '../../../core/schema/changes.ts'
import { policyDifferences, policyLeaves } from '../../../core/scale/policy-leaves.ts'
import type { Policy } from '../../../core/scale/policy.ts'
import type { ChangeAnswer } from '../../../core/schema/submissions.ts'
import { useScale } from '../../api/scale.ts'
import { Button } from '../../components/button.tsx'
import { HostRuleFields, MethodRuleFields } from '../../components/curation/scale/policy-fields.tsx'
import { leafOf, policyTexts, readPolicy, type TypedPolicy } from '../../components/curation/scale/policy-typed.ts'
import { FailedState, ProblemNote } from '../../components/failed-state.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ApiProblem } from '../../api/client.ts'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'

const schema = changePayloadSchemas['policy.set']

/** Sets the adoption policy: the rule of every method, and how hosts are found. */
export function PolicyForm(props: ChangeFormProps<'policy.set'>) {
  const scale = useScale()
  if (scale.isError) return <FailedState error={scale.error} onRetry={() => void scale.refetch()} />
  return scale.data ? <Fields {...props} policy={scale.data.policy} /> : <Skeleton lines={8} />
}

function Fields({ policy, change, onSave, isSaving, error }: ChangeFormProps<'policy.set'> & { policy: Policy }) {
  const before = change ? schema.parse(change.payload) : null
  const held = policyTexts(policy)
  const [typed, setTyped] = useState<TypedPolicy>(() => (change && before ? movedBy(change, before.document, held) : {}))
  const [reason, setReason] = useState(before?.reason ?? '')
  const [tried, setTried] = useState(false)
  const read = readPolicy(policy, typed)
  const parsed = schema.safeParse({ document: read.policy, reason })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const sent = error instanceof ApiProblem ? new Map(error.errors.map((e) => [leafOf(e.path.replace(/^payload\.document\./, '').split('.').map((p) => (/^\d+$/.test(p) ? Number(p) : p)), read.policy), e.message])) : new Map<string, string>()
  const save = async (): Promise<void> => {
    setTried(true)
    if (parsed.success) await onSave({ action: 'policy.set', payload: parsed.data })
  }
  const fields = { held, typed, onChange: setTyped, errorOf: (path: string) => read.errors.get(path) ?? sent.get(path) }
  const differences = read.errors.size === 0 ? policyDifferences(policy, read.policy) : []
  return (
    <form
      className="grid grid-cols-[minmax(0,1fr)] gap-6"
      onSubmit={(event) => {
        event.preventDefault()
        void save()
      }}
    >
      <MethodRuleFields {...fields} />
      <HostRuleFields {...fields} />
      <p className="text-muted">{differences.length === 0 ? 'Nothing differs from the policy in force.' : `Proposed: ${differences.map((d) => `${d.label} ${d.before ?? 'none'} → ${d.after ?? 'none'}`).join('; ')}.`}</p>
      <TextField label="Reason" value={reason} onChange={setReason} error={errorAt(issues, error, 'reason')} help="Why these rules are better" />
      {error ? <ProblemNote error={error} safe="What you typed is kept." /> : null}
      <div>
        <Button type="submit" kind="primary" isPending={isSaving}>{change ? 'Save' : 'Add to the draft'}</Button>
      </div>
    </form>
  )
}

/** What others moved since the change was made stays as they left it: only the leaves that this change moves are proposed again. */
function movedBy(change: ChangeAnswer, document: Policy, held: TypedPolicy): TypedPolicy {
  const labels = new Set(change.diff.map((d) => d.field))
  const moved = new Set(policyLeaves(document).filter((l) => labels.has(l.label)).map((l) => l.path))
  return Object.fromEntries(Object.entries(policyTexts(document)).filter(([path, text]) => moved.has(path) && held[path] !== text))
}
