import { z, type ZodType } from 'zod'

/** The JSON schema of a zod schema, for the documentation; what JSON schema cannot say is left open. */
export function jsonSchemaOf(schema: ZodType, io: 'input' | 'output'): unknown {
  return z.toJSONSchema(schema, { io, unrepresentable: 'any' })
}
