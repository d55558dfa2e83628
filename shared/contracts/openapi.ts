import { z } from 'zod';
import { endpoints } from './api';
import type { Access, Endpoint } from './endpoint';
import { problem } from './problem';

type Json = Record<string, unknown>;

const security: Readonly<Record<'session' | 'device', Json>> = {
  session: { type: 'apiKey', in: 'cookie', name: 'lampmeadow' },
  device: { type: 'http', scheme: 'bearer', description: 'A device token' },
};

/**
 * The API described by itself, made from the endpoint table.
 *
 * @param serverUrl - Where the API is served, such as `/api/v1`.
 * @returns An OpenAPI 3.1 document.
 */
export function openApiDocument(serverUrl: string): Json {
  const paths: Record<string, Json> = {};
  for (const endpoint of endpoints) {
    const path = endpoint.path.replaceAll(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [endpoint.method]: operationOf(endpoint) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Lampmeadow',
      version: '1',
      description:
        'Shelves, readings, logger files, alerts and care of growing rooms. Instants are ISO 8601, values in the stored unit. ' +
        'Writes with the session cookie carry X-CSRF-Token from the account; they may carry an Idempotency-Key.',
    },
    servers: [{ url: serverUrl }],
    components: { securitySchemes: security },
    paths,
  };
}

function operationOf(endpoint: Endpoint): Json {
  const hasBody = endpoint.method !== 'get' && endpoint.method !== 'delete';
  const mediaType = endpoint.media?.request ?? 'application/json';
  const request = schemaOf(endpoint.body, 'input');
  const isEmpty =
    Object.keys((request['properties'] ?? {}) as Json).length === 0 && request['type'] === 'object';
  const body = mediaType === 'multipart/form-data' ? uploadSchema : request;
  return {
    operationId: endpoint.name,
    summary: endpoint.summary,
    ...securityOf(endpoint.access),
    parameters: [...parametersOf(endpoint.params, 'path'), ...parametersOf(endpoint.query, 'query')],
    ...(hasBody && (!isEmpty || body === uploadSchema)
      ? { requestBody: { required: true, content: { [mediaType]: { schema: body } } } }
      : {}),
    responses: {
      [String(endpoint.status)]:
        endpoint.status === 204
          ? { description: 'Done' }
          : {
              description: 'Done',
              content: { 'application/json': { schema: schemaOf(endpoint.reply, 'output') } },
            },
      default: {
        description: 'A problem (RFC 9457)',
        content: { 'application/problem+json': { schema: schemaOf(problem, 'output') } },
      },
    },
  };
}

const uploadSchema: Json = {
  type: 'object',
  properties: { file: { type: 'string', format: 'binary' } },
  required: ['file'],
};

function securityOf(access: Access): Json {
  if (access === 'anyone') return { security: [] };
  return access === 'device'
    ? { security: [{ device: [] }] }
    : { security: [{ session: [] }], ...(access === 'signedIn' ? {} : { 'x-least-role': access }) };
}

function parametersOf(schema: z.ZodType, place: 'path' | 'query'): Json[] {
  const { properties, required } = flat(schemaOf(schema, 'input'));
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: property,
  }));
}

/** Properties of an object schema, those of an intersection taken together. */
function flat(schema: Json): { properties: Json; required: string[] } {
  const parts = (schema['allOf'] as Json[] | undefined) ?? [];
  const inner = parts.map(flat);
  return {
    properties: Object.assign({}, schema['properties'], ...inner.map(({ properties }) => properties)) as Json,
    required: [
      ...((schema['required'] as string[] | undefined) ?? []),
      ...inner.flatMap(({ required }) => required),
    ],
  };
}

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, {
    io,
    unrepresentable: 'any',
    target: 'draft-2020-12',
  });
  return rest;
}
