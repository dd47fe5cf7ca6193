/** Submissions: drafts, their changes, their effect, the moves of authors and reviewers. */
import { z } from 'zod'
import { changeInputSchema } from '../../core/schema/changes.ts'
import {
  decisionSchema, effectLineSchema, effectSchema, refusalSchema, remarkInputSchema, submissionInputSchema, submissionListSchema, submissionPatchSchema, submissionSchema, SUBMISSION_STATES,
  transitionSchema,
} from '../../core/schema/submissions.ts'
import { answerInLines } from '../http/lines.ts'
import { route } from '../http/route.ts'
import type { Route } from '../http/route.ts'
import { approve } from '../services/review/approve.ts'
import { refuse } from '../services/review/decide.ts'
import { effectOfSubmission } from '../services/review/effect.ts'
import { answerOf, listSubmissions } from '../services/submissions/answer.ts'
import { addChange, createSubmission, patchChange, patchSubmission, removeChange, removeSubmission } from '../services/submissions/drafts.ts'
import { remark, submit, withdraw } from '../services/submissions/transitions.ts'

const number = z.coerce.number().int().positive().max(2_147_483_647)
const one = z.object({ id: number })
const oneChange = z.object({ id: number, n: number })
const yes = z.enum(['true', 'false']).default('false').transform((word) => word === 'true')
const listQuery = z.strictObject({ state: z.enum(SUBMISSION_STATES).optional(), mine: yes, review: yes })

export const submissionRoutes: Route[] = [
  route({
    method: 'get', path: '/api/submissions', summary: 'Submissions that you may see, those last touched first', permission: 'submission.read', query: listQuery,
    answer: submissionListSchema,
    handle: async ({ knex, reader, query }) => ({ submissions: await listSubmissions(knex, reader, query) }),
  }),
  route({
    method: 'post', path: '/api/submissions', summary: 'Begin a draft', permission: 'submission.write', limit: 'write', body: submissionInputSchema,
    answer: submissionSchema, status: 201,
    handle: (context) => createSubmission(context, context.reader, context.body),
  }),
  route({
    method: 'get', path: '/api/submissions/:id', summary: 'A submission with its changes, checks and conflicts', permission: 'submission.read', params: one,
    answer: submissionSchema,
    handle: ({ knex, reader, params }) => answerOf(knex, params.id, reader),
  }),
  route({
    method: 'patch', path: '/api/submissions/:id', summary: 'Rename a draft or rewrite its summary', permission: 'submission.write', limit: 'write', params: one,
    body: submissionPatchSchema, answer: submissionSchema,
    handle: (context) => patchSubmission(context, context.reader, context.params.id, context.body),
  }),
  route({
    method: 'delete', path: '/api/submissions/:id', summary: 'Remove a draft that was never submitted', permission: 'submission.write', limit: 'write', params: one,
    status: 204,
    handle: async (context) => {
      await removeSubmission(context, context.reader, context.params.id)
      context.response.status(204).end()
    },
  }),
  route({
    method: 'post', path: '/api/submissions/:id/changes', summary: 'Add a change', permission: 'submission.write', limit: 'write', params: one, body: changeInputSchema,
    answer: submissionSchema, status: 201,
    handle: (context) => addChange(context, context.reader, context.params.id, context.body),
  }),
  route({
    method: 'patch', path: '/api/submissions/:id/changes/:n', summary: 'Rewrite a change (n is its id)', permission: 'submission.write', limit: 'write', params: oneChange,
    body: changeInputSchema, answer: submissionSchema,
    handle: (context) => patchChange(context, context.reader, context.params.id, context.params.n, context.body),
  }),
  route({
    method: 'delete', path: '/api/submissions/:id/changes/:n', summary: 'Remove a change (n is its id)', permission: 'submission.write', limit: 'write', params: oneChange,
    answer: submissionSchema,
    handle: (context) => removeChange(context, context.reader, context.params.id, context.params.n),
  }),
  route({
    method: 'get', path: '/api/submissions/:id/effect', summary: 'What approval would do to the whole catalogue', permission: 'submission.read', params: one,
    answer: effectSchema,
    handle: (context) => effectOfSubmission(context, context.reader, context.params.id),
  }),
  route({
    method: 'get', path: '/api/submissions/:id/effect/progress', summary: 'The same line by line (NDJSON): how far the computation is, then the effect or the problem',
    permission: 'submission.read', params: one, answer: effectLineSchema,
    handle: (context) =>
      answerInLines(context.response, async (tell) => ({
        effect: await effectOfSubmission(context, context.reader, context.params.id, ({ done, step }) => tell({ progress: done, step })),
      })),
  }),
  route({
    method: 'post', path: '/api/submissions/:id/submit', summary: 'Hand a draft to the approvers', permission: 'submission.write', limit: 'write', params: one,
    body: transitionSchema, answer: submissionSchema,
    handle: (context) => submit(context, context.reader, context.params.id, context.body.lockVersion),
  }),
  route({
    method: 'post', path: '/api/submissions/:id/withdraw', summary: 'Take a submission back', permission: 'submission.write', limit: 'write', params: one,
    body: transitionSchema, answer: submissionSchema,
    handle: (context) => withdraw(context, context.reader, context.params.id, context.body.lockVersion),
  }),
  route({
    method: 'post', path: '/api/submissions/:id/return', summary: 'Return a submission to its author, saying why', permission: 'submission.review', limit: 'write',
    params: one, body: refusalSchema, answer: submissionSchema,
    handle: (context) => refuse(context, context.reader, context.params.id, 'return', context.body),
  }),
  route({
    method: 'post', path: '/api/submissions/:id/reject', summary: 'Reject a submission, saying why', permission: 'submission.review', limit: 'write', params: one,
    body: refusalSchema, answer: submissionSchema,
    handle: (context) => refuse(context, context.reader, context.params.id, 'reject', context.body),
  }),
  route({
    method: 'post', path: '/api/submissions/:id/approve', summary: 'Approve a submission: the catalogue moves by one revision', permission: 'submission.review',
    limit: 'write', params: one, body: decisionSchema, answer: submissionSchema,
    handle: (context) => approve(context, context.reader, context.params.id, context.body),
  }),
  route({
    method: 'post', path: '/api/submissions/:id/remarks', summary: 'Remark on a submission or on one of its changes', permission: 'submission.read', limit: 'write',
    params: one, body: remarkInputSchema, answer: submissionSchema, status: 201,
    handle: (context) => remark(context, context.reader, context.params.id, context.body),
  }),
]
