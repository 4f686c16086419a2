import { getQuery, getRouterParams, readRawBody } from 'h3'
import type { H3Event } from 'h3'
import type { z } from 'zod'
import { BadRequest, Invalid, NotFound } from '#server/services/errors'
import type { FieldProblem } from '#server/services/errors'

const maxBodyBytes = 256 * 1024
const maxDepth = 20

/** Reads and validates a JSON body. @throws BadRequest, Invalid with a path for each field; values are never echoed. */
export async function parseInput<Schema extends z.ZodType>(event: H3Event, schema: Schema): Promise<z.output<Schema>> {
  const raw = (await readRawBody(event)) ?? ''
  if (Buffer.byteLength(raw) > maxBodyBytes) throw new BadRequest('The body is larger than 256 kB.', 413)
  let body: unknown
  try {
    body = raw === '' ? {} : JSON.parse(raw)
  }
  catch {
    throw new BadRequest('The body is not JSON.')
  }
  if (depthOf(body) > maxDepth) throw new BadRequest('The body is nested too deeply.')
  return check(schema, body)
}

/** Validates the query string. @throws Invalid */
export function parseQuery<Schema extends z.ZodType>(event: H3Event, schema: Schema): z.output<Schema> {
  return check(schema, getQuery(event))
}

/** Validates path parameters; one that cannot exist is answered like one that does not. @throws NotFound */
export function parseParams<Schema extends z.ZodType>(event: H3Event, schema: Schema): z.output<Schema> {
  const parsed = schema.safeParse(getRouterParams(event))
  if (!parsed.success) throw new NotFound()
  return parsed.data
}

function check<Schema extends z.ZodType>(schema: Schema, value: unknown): z.output<Schema> {
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  throw new Invalid(parsed.error.issues.map(describe))
}

function describe(issue: z.core.$ZodIssue): FieldProblem {
  const path = issue.path.map(String).join('.')
  switch (issue.code) {
    case 'unrecognized_keys': return { path: [path, issue.keys.join(', ')].filter(Boolean).join('.'), message: 'This field is not known here.' }
    // zod repeats the rejected value in these; say what is allowed instead.
    case 'invalid_value': return { path, message: 'Choose one of the offered answers.' }
    default: return { path, message: issue.message }
  }
}

function depthOf(value: unknown, depth = 0): number {
  if (depth > maxDepth || typeof value !== 'object' || value === null) return depth
  return Math.max(depth, ...Object.values(value).map(inner => depthOf(inner, depth + 1)))
}
