import { useNavigate, useSearchParams } from 'react-router-dom'
import { useSession } from '../../api/session.ts'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { safeReturn } from '../../paths.ts'
import { SignInForm } from './sign-in-form.tsx'

export default function SignInPage() {
  useDocumentTitle('Sign in')
  const session = useSession()
  const navigate = useNavigate()
  const [search] = useSearchParams()
  const back = safeReturn(search.get('from'))
  return (
    <div className="page">
      <div className="mx-auto w-full max-w-lg pt-4 sm:pt-10">
        <PageHeader title="Sign in" intro="The newest release is open to everybody. Signing in opens the current revision and the desk." />
        {session.state === 'failed' ? (
          <FailedState error={session.error} onRetry={session.retry} title="Signing in does not work just now" />
        ) : session.user ? (
          <Sheet>
            <p>You are signed in as {session.user.name}.</p>
            <p className="mt-2">
              <Link to={back}>Go on</Link>
            </p>
          </Sheet>
        ) : (
          <Sheet>
            <SignInForm catalogueKind={session.catalogue?.kind ?? null} onDone={() => void navigate(back, { replace: true })} />
          </Sheet>
        )}
      </div>
    </div>
  )
}
