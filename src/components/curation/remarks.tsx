import { useState } from 'react'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { useRemark } from '../../api/submissions.ts'
import { formatDayTime } from '../../lib/format.ts'
import { Button } from '../button.tsx'
import { ProblemNote } from '../failed-state.tsx'
import { TextArea } from '../text-area.tsx'

/** The talk about a submission. */
export function Remarks({ submission }: { submission: SubmissionAnswer }) {
  const remark = useRemark(submission.id)
  const [body, setBody] = useState('')
  return (
    <div>
      {submission.remarks.length === 0 && <p className="mb-3 text-muted">Nobody has said anything yet.</p>}
      <ul className="mb-4 grid gap-3">
        {submission.remarks.map((r) => (
          <li key={r.id}>
            <p className="text-sm text-muted">
              {r.author}, {formatDayTime(r.at)}
            </p>
            <p className="prose-measure whitespace-pre-line">{r.body}</p>
          </li>
        ))}
      </ul>
      <TextArea label="Remark" rows={2} value={body} onChange={setBody} />
      {remark.isError && <ProblemNote error={remark.error} />}
      <div className="mt-2">
        <Button isDisabled={body.trim() === ''} isPending={remark.isPending} onPress={() => remark.mutate({ body }, { onSuccess: () => setBody('') })}>
          Add the remark
        </Button>
      </div>
    </div>
  )
}
