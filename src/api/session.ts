import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { can, type Permission } from '../../core/permissions.ts'
import { sessionSchema, type Session, type SignIn } from '../../core/schema/session.ts'
import { getJson, sendJson, setCsrfToken } from './client.ts'
import { keys } from './keys.ts'

const PATH = '/api/session'

function keepToken(session: Session): Session {
  setCsrfToken(session.csrfToken)
  return session
}

export const sessionQuery = {
  queryKey: keys.session,
  queryFn: async ({ signal }: { signal: AbortSignal }) => keepToken(await getJson(PATH, sessionSchema, { signal })),
  staleTime: 5 * 60_000,
}

export interface SessionView {
  state: 'loading' | 'ready' | 'failed'
  user: Session['user']
  permissions: readonly string[]
  /** Null until the server has answered. */
  catalogue: Session['catalogue'] | null
  error: unknown
  retry(): void
}

const NO_PERMISSIONS: readonly string[] = []

/** Who is signed in, what they may do, and which catalogue this is. Before the answer: nobody, nothing. */
export function useSession(): SessionView {
  const query = useQuery(sessionQuery)
  return {
    state: query.data ? 'ready' : query.isError ? 'failed' : 'loading',
    user: query.data?.user ?? null,
    permissions: query.data?.permissions ?? NO_PERMISSIONS,
    catalogue: query.data?.catalogue ?? null,
    error: query.error,
    retry: () => void query.refetch(),
  }
}

/** Whether the reader may do this: for showing only what will work. The server decides again. */
export function useCan(permission: Permission): boolean {
  return can(useSession().permissions, permission)
}

/** Signing in. Everything read as somebody else is read again. */
export function useSignIn() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: async (body: SignIn) => {
      // The token of the visitor's session is needed for the write; it may be older than the server.
      await client.fetchQuery({ ...sessionQuery, staleTime: 0 })
      return keepToken(await sendJson('POST', PATH, body, sessionSchema))
    },
    onSuccess: async (session) => {
      client.setQueryData(keys.session, session)
      await client.invalidateQueries({ predicate: (query) => query.queryKey[0] !== keys.session[0] })
    },
  })
}

/** Signing out. What only the signed-in may read leaves the memory. */
export function useSignOut() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: async () => keepToken(await sendJson('DELETE', PATH, undefined, sessionSchema)),
    onSuccess: (session) => {
      void client.resetQueries({ predicate: (query) => query.queryKey[0] !== keys.session[0] })
      client.setQueryData(keys.session, session)
    },
  })
}
