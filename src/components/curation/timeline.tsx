import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { formatDayTime } from '../../lib/format.ts'

/** What happened to a submission, newest first. */
export function Timeline({ entries }: { entries: SubmissionAnswer['timeline'] }) {
  return (
    <ol className="grid gap-3">
      {entries.map((e) => (
        <li key={`${e.at} ${e.what}`} className="border-l-2 border-line pl-3">
          <p>
            <strong className="font-semibold">{e.what}</strong>
            {e.by && ` by ${e.by}`} <span className="text-sm text-muted">{formatDayTime(e.at)}</span>
          </p>
          {e.note && <p className="prose-measure whitespace-pre-line text-muted">{e.note}</p>}
        </li>
      ))}
    </ol>
  )
}
