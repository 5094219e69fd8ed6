import { z } from 'zod'
import { EvaluateRequestSchema, EvaluateResponseSchema, MaterialsResponseSchema, SizeRequestSchema, SizeResponseSchema } from '#shared/schemas/spring'
import { problemSchema } from '#shared/schemas/problem'

const PROBLEM_WORDS: Readonly<Record<string, string>> = {
  400: 'The body could not be read.', 413: 'The body is over 64 KiB.', 415: 'The body is no JSON.', 422: 'A value is wrong; `errors` names each.',
  429: 'Too many requests; `Retry-After` says how long to wait.', 503: 'Not available at the moment.',
}

const content = (name: string, type = 'application/json') => ({ [type]: { schema: { $ref: `#/components/schemas/${name}` } } })
const problems = (...statuses: readonly number[]) => Object.fromEntries(statuses.map(status => [status, { description: PROBLEM_WORDS[status], content: content('Problem', 'application/problem+json') }]))

function postOperation({ id, summary, request, response }: { id: string, summary: string, request: string, response: string }) {
  return {
    post: {
      operationId: id, summary, requestBody: { required: true, content: content(request) },
      responses: { 200: { description: 'Computed.', content: content(response) }, ...problems(400, 413, 415, 422, 429, 503) },
    },
  }
}

const input = (schema: z.ZodType) => withoutDialect(z.toJSONSchema(schema, { io: 'input' }))
const output = (schema: z.ZodType) => withoutDialect(z.toJSONSchema(schema, { io: 'output' }))
const withoutDialect = ({ $schema: _dialect, ...schema }: Record<string, unknown>) => schema

/** The OpenAPI 3.1 document of `/api/v1`, made of the very schemas that parse the requests. */
export function describeApi(origin: string): Record<string, unknown> {
  return {
    openapi: '3.1.0',
    info: { title: 'Wirewright: springs', version: '1', description: 'SI units, named in each field: mm, N, MPa, g, kg, °C. Numbers are finite; an unknown field is refused.' },
    servers: [{ url: origin }],
    paths: {
      '/api/v1/springs/evaluate': postOperation({ id: 'evaluateSpring', summary: 'A spring fully described: every computed value and check.', request: 'EvaluateRequest', response: 'EvaluateResponse' }),
      '/api/v1/springs/size': postOperation({ id: 'sizeSpring', summary: 'What a spring must do: designs in order of the objective, or what clashes and the smallest changes.', request: 'SizeRequest', response: 'SizeResponse' }),
      '/api/v1/materials': { get: { operationId: 'listMaterials', summary: 'Materials with their values and sources.', responses: { 200: { description: 'The materials.', content: content('Materials') }, ...problems(429, 503) } } },
      '/api/v1/openapi.json': { get: { operationId: 'describeApi', summary: 'This document.', responses: { 200: { description: 'The document.', content: { 'application/json': { schema: { type: 'object' } } } }, ...problems(429) } } },
    },
    components: {
      schemas: {
        EvaluateRequest: input(EvaluateRequestSchema), EvaluateResponse: output(EvaluateResponseSchema), SizeRequest: input(SizeRequestSchema), SizeResponse: output(SizeResponseSchema),
        Materials: output(MaterialsResponseSchema), Problem: output(problemSchema),
      },
    },
  }
}
