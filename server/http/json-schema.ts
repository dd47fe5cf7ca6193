import { z, type ZodType } from 'zod'

/** The JSON schema of a zod schema, for the documentation; what JSON schema cannot say is left open. */
export function jsonSchemaOf(schema: ZodType, io: 'input' | 'output'): Record<string, unknown> {
  // Which dialect it is, OpenAPI says once for all.
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' })
  return rest
}
