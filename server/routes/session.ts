/** Who one is. */
import { sessionSchema, signInSchema, type Session } from '../../core/schema/session.ts'
import { readerOf } from '../auth/people.ts'
import { signIn, signOut } from '../auth/sign-in.ts'
import { route, type Reader, type Route, type Services } from '../http/route.ts'
import { catalogueAtHand } from '../queries/catalogue-at-hand.ts'

async function sessionOf({ knex }: Services, reader: Reader, csrfToken: string): Promise<Session> {
  return { user: reader.user, permissions: [...reader.permissions], csrfToken, catalogue: await catalogueAtHand(knex) }
}

export const sessionRoutes: Route[] = [
  route({
    method: 'get', path: '/api/session', summary: 'Who is signed in, what they may do, and which catalogue this is', permission: 'session.use', answer: sessionSchema,
    handle: (context) => sessionOf(context, context.reader, context.request.session?.csrfToken ?? ''),
  }),
  route({
    method: 'post', path: '/api/session', summary: 'Sign in', permission: 'session.use', limit: 'sign-in', body: signInSchema, answer: sessionSchema,
    handle: async (context) => {
      const person = await signIn(context, context.request, context.body.email)
      return sessionOf(context, readerOf(person), context.request.session.csrfToken ?? '')
    },
  }),
  route({
    method: 'delete', path: '/api/session', summary: 'Sign out', permission: 'session.use', answer: sessionSchema,
    handle: async (context) => {
      await signOut(context, context.request, context.response)
      return sessionOf(context, readerOf(null), '')
    },
  }),
]
