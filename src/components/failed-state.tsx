import { CircleAlert } from 'lucide-react'
import { useLocation } from 'react-router-dom'
import { ApiProblem } from '../api/problem.ts'
import { copyText } from '../lib/clipboard.ts'
import { paths } from '../paths.ts'
import { Button } from './button.tsx'
import { Link } from './link.tsx'

export interface FailedStateProps {
  error: unknown
  onRetry?: () => void
  /** What is safe, in a sentence, where the problem does not say it. */
  safe?: string
  /** Instead of the problem's own title. */
  title?: string
}

interface Words {
  title: string
  detail: string
  errors: readonly { path: string; message: string }[]
  instance?: string
}

function wordsOf(error: unknown): Words {
  if (error instanceof ApiProblem) return { title: error.title, detail: error.detail, errors: error.errors, instance: error.instance }
  const detail = error instanceof Error && error.message ? `${error.message}. Reload the page; if it stays so, tell the steward.` : 'Reload the page; if it stays so, tell the steward.'
  return { title: 'Something went wrong on this page', detail, errors: [] }
}

/** In place of what could not be read: what happened, what is safe, what to do. */
export function FailedState({ error, onRetry, safe, title }: FailedStateProps) {
  const words = wordsOf(error)
  const { instance } = words
  const location = useLocation()
  const mustSignIn = error instanceof ApiProblem && error.status === 401
  return (
    <div role="alert" className="rounded-lg border border-line border-l-4 border-l-stop bg-sheet px-6 py-5">
      <p className="flex items-center gap-2 font-serif text-lg font-semibold">
        <CircleAlert size={18} aria-hidden className="shrink-0 text-stop" />
        {title ?? words.title}
      </p>
      <p className="prose-measure mt-1">{words.detail}</p>
      {safe && <p className="prose-measure mt-1 text-muted">{safe}</p>}
      <ProblemList errors={words.errors} />
      {(onRetry || instance || mustSignIn) && (
        <div className="mt-4 flex flex-wrap items-center gap-3">
          {mustSignIn && (
            <Link look="primary" to={paths.signInFrom(location.pathname + location.search)}>
              Sign in
            </Link>
          )}
          {onRetry && <Button onPress={onRetry}>Try again</Button>}
          {instance && (
            <Button kind="plain" size="small" onPress={() => void copyText(instance, 'the request’s number')}>
              Copy the request’s number
            </Button>
          )}
        </div>
      )}
    </div>
  )
}

function ProblemList({ errors }: { errors: Words['errors'] }) {
  if (errors.length === 0) return null
  return (
    <ul className="mt-2 list-disc pl-5">
      {errors.map((entry) => (
        <li key={`${entry.path} ${entry.message}`}>
          {entry.path && <strong className="font-semibold">{entry.path}: </strong>}
          {entry.message}
        </li>
      ))}
    </ul>
  )
}

/** The same inside a form, above its buttons. Nothing without an error. */
export function ProblemNote({ error, safe }: { error: unknown; safe?: string }) {
  if (!error) return null
  const words = wordsOf(error)
  return (
    <div role="alert" className="rounded-md border border-stop bg-stop-soft px-4 py-3 text-ink">
      <p className="font-semibold">{words.title}</p>
      <p>{words.detail}</p>
      {safe && <p>{safe}</p>}
      <ProblemList errors={words.errors} />
    </div>
  )
}
