/** The OpenAPI document, made from the contract so that the two cannot part. */
import { z } from 'zod'

import { API_ROOT, type Endpoint, ENDPOINTS } from '@/server/contract/endpoints'
import { Problem, type ProblemCode, PROBLEMS } from '@/server/contract/problems'

type JsonObject = Readonly<Record<string, unknown>>

const PROBLEM_MEDIA_TYPE = 'application/problem+json'

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): JsonObject {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, {
    io,
    target: 'draft-2020-12',
    // Arrays of an answer are read-only in TypeScript, which is not what the word means in OpenAPI.
    override: ({ jsonSchema: made }) => {
      delete made.readOnly
    },
  })
  return rest
}

const reference = (name: string): JsonObject => ({ $ref: `#/components/schemas/${name}` })

function problemResponses(codes: readonly ProblemCode[]): JsonObject {
  const statuses = [...new Set(codes.map((code) => PROBLEMS[code].status))].sort((a, b) => a - b)
  return Object.fromEntries(
    statuses.map((status) => {
      const titles = codes.filter((code) => PROBLEMS[code].status === status).map((code) => PROBLEMS[code].title)
      const content = { [PROBLEM_MEDIA_TYPE]: { schema: reference('Problem') } }
      return [String(status), { description: titles.join(' '), content }]
    }),
  )
}

function operation({ operation: operationId, summary, parameters, request, response, problems }: Endpoint): JsonObject {
  return {
    operationId,
    summary,
    ...(parameters && {
      parameters: Object.entries(parameters).map(([name, schema]) => ({
        name,
        in: 'path',
        required: true,
        schema: jsonSchema(schema, 'input'),
      })),
    }),
    ...(request && {
      requestBody: { required: true, content: { 'application/json': { schema: reference(request.name) } } },
    }),
    responses: {
      [response.status ?? 200]: {
        description: response.description,
        ...(response.status === 202 && {
          headers: { Location: { description: 'Where to ask for it.', schema: { type: 'string' } } },
        }),
        content: { 'application/json': { schema: reference(response.name) } },
      },
      ...problemResponses(problems),
    },
  }
}

export function buildOpenApi(): JsonObject {
  const schemas: Record<string, JsonObject> = { Problem: jsonSchema(Problem, 'output') }
  const paths: Record<string, Record<string, JsonObject>> = {}
  for (const endpoint of ENDPOINTS) {
    const { request, response, path, method } = endpoint
    if (request) schemas[request.name] = jsonSchema(request.schema, 'input')
    schemas[response.name] = jsonSchema(response.schema, 'output')
    paths[path] = { ...paths[path], [method]: operation(endpoint) }
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Steadrail',
      version: '1',
      description: 'Loop design of switching converters. SI units throughout; gains in decibels, angles in degrees.',
    },
    servers: [{ url: API_ROOT }],
    paths,
    components: { schemas },
  }
}
