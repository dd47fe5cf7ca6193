import { Plus } from 'lucide-react'
import { useEffect, useRef } from 'react'
import type { ScaleAnswer } from '../../../core/schema/scale.ts'
import { fieldError } from '../../api/client.ts'
import { Button } from '../../components/button.tsx'
import { AnchorFields } from '../../components/curation/scale/anchor-fields.tsx'
import { NEW_ANCHOR, typedAnchor, type TypedAnchor } from '../../components/curation/scale/anchor-typed.ts'
import { HostRuleFields, MethodRuleFields } from '../../components/curation/scale/policy-fields.tsx'
import { policyTexts, type TypedPolicy } from '../../components/curation/scale/policy-typed.ts'
import { Sheet } from '../../components/sheet.tsx'
import type { Proposal, ReadProposal } from './proposal.ts'

export interface ProposalFieldsProps {
  scale: ScaleAnswer
  typed: Proposal
  onChange: (typed: Proposal) => void
  read: ReadProposal
  tried: boolean
  /** What the server said of it. */
  sent: unknown
  /** Key of the anchor that is scrolled to. */
  open: string | null
}

/** Every number of the scale in a field of its own, as it holds until somebody types. */
export function ProposalFields({ scale, typed, onChange, read, tried, sent, open }: ProposalFieldsProps) {
  const errorsOf = (key: string): ReadonlyMap<string, string> => read.proposed.find((p) => p.key === key)?.errors ?? new Map()
  const setAnchor = (key: string, anchor: TypedAnchor): void => onChange({ ...typed, anchors: { ...typed.anchors, [key]: anchor } })
  const setAdded = (added: readonly TypedAnchor[]): void => onChange({ ...typed, added })
  const policy = { held: policyTexts(scale.policy), typed: typed.policy, onChange: (next: TypedPolicy) => onChange({ ...typed, policy: next }), errorOf: (path: string) => read.policyErrors.get(path) }
  return (
    <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-6">
      {scale.anchors.map((a) => (
        <AnchorSheet key={a.key} title={a.label} isAsked={open === a.key}>
          <AnchorFields
            typed={typed.anchors[a.key] ?? typedAnchor(a)}
            onChange={(anchor) => setAnchor(a.key, anchor)}
            held={a}
            anchors={scale.anchors}
            errorOf={(field) => errorsOf(a.key).get(field) ?? (typed.anchors[a.key] ? fieldError(sent, `payload.${field}`) : undefined)}
          />
        </AnchorSheet>
      ))}
      {typed.added.map((anchor, i) => (
        <Sheet key={i} title={anchor.label || 'A new anchor'} actions={<Button size="small" onPress={() => setAdded(typed.added.filter((_, other) => other !== i))}>Leave it out</Button>}>
          <AnchorFields
            typed={anchor}
            onChange={(next) => setAdded(typed.added.map((other, k) => (k === i ? next : other)))}
            held={undefined}
            anchors={scale.anchors}
            errorOf={(field) => (tried ? (errorsOf(`added.${i}`).get(field) ?? fieldError(sent, `payload.${field}`)) : undefined)}
          />
        </Sheet>
      ))}
      <div>
        <Button icon={<Plus size={16} aria-hidden />} onPress={() => setAdded([...typed.added, NEW_ANCHOR])}>Add an anchor</Button>
      </div>
      <Sheet title="Rules of methods"><MethodRuleFields {...policy} /></Sheet>
      <Sheet title="Hosts, tension and name"><HostRuleFields {...policy} /></Sheet>
    </div>
  )
}

function AnchorSheet({ title, isAsked, children }: { title: string; isAsked: boolean; children: React.ReactNode }) {
  const box = useRef<HTMLDivElement>(null)
  useEffect(() => {
    if (!isAsked) return
    box.current?.scrollIntoView({ block: 'start' })
    box.current?.querySelector('input')?.focus({ preventScroll: true })
  }, [isAsked])
  return (
    <div ref={box} className="scroll-mt-24">
      <Sheet title={title} selected={isAsked}>{children}</Sheet>
    </div>
  )
}
