import { useQueryClient } from '@tanstack/react-query'
import { lazy, Suspense, useEffect, useState } from 'react'
import type { Session } from '../../core/schema/session.ts'
import { onRefused } from '../api/client.ts'
import { keys } from '../api/keys.ts'
import { sessionQuery, useSession } from '../api/session.ts'
import { Dialog } from '../components/dialog.tsx'
import { notify } from '../components/toast.tsx'

const SignInForm = lazy(async () => ({ default: (await import('../features/session/sign-in-form.tsx')).SignInForm }))

/**
 * When a session has ended while somebody was at work: signing in again over the page, which stays as it is behind. A visitor who
 * was never signed in is not asked.
 */
export function SignInAgain() {
  const client = useQueryClient()
  const { catalogue } = useSession()
  const [lost, setLost] = useState<Session['user']>(null)
  useEffect(
    () =>
      onRefused((status) => {
        const user = client.getQueryData<Session>(keys.session)?.user ?? null
        if (status === 401 && user) setLost(user)
        // Whether the session is gone or only not allowed to: the server knows. A new token comes with the answer.
        else client.fetchQuery({ ...sessionQuery, staleTime: 0 }).then((session) => {
          if (user && !session.user) setLost(user)
        }, () => undefined)
      }),
    [client],
  )
  if (!lost) return null
  function leave(): void {
    setLost(null)
    void client.invalidateQueries({ queryKey: keys.session })
  }
  return (
    <Dialog title="Sign in again" role="alertdialog" size="small" isOpen onOpenChange={leave}>
      <p>Your session has ended. What you typed is kept on the page behind; sign in to go on, then send it again.</p>
      <Suspense>
        <SignInForm
          email={lost.email}
          catalogueKind={catalogue?.kind ?? null}
          onDone={() => {
            setLost(null)
            notify('Signed in again. What you were doing can go on.', { tone: 'good' })
          }}
        />
      </Suspense>
    </Dialog>
  )
}
