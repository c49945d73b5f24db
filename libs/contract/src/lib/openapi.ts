import { z } from 'zod';
import { type Endpoint } from './endpoint';
import { ENDPOINTS } from './endpoints';
import { problemSchema } from './problem';
import { PERMISSIONS } from './roles';

type Json = Record<string, unknown>;

/** An OpenAPI 3.1 document, as far as its own shape goes; schemas are JSON Schema 2020-12. */
export interface OpenApiDocument {
  openapi: '3.1.0';
  info: { title: string; version: string; description: string };
  servers: { url: string }[];
  paths: Record<string, Record<string, Json>>;
  components: { schemas: Record<string, unknown>; securitySchemes: Json };
}

const SESSION_COOKIE = 'brakeven.sid';
const CSRF_HEADER = 'X-XSRF-TOKEN';

/** Describes every endpoint of the contract from the schemas that the server itself reads and answers by. */
export function createOpenApiDocument(version = '1'): OpenApiDocument {
  const schemas: Record<string, unknown> = {};
  const paths: OpenApiDocument['paths'] = {};
  for (const [name, definition] of Object.entries<Endpoint>(ENDPOINTS)) {
    const path = definition.path.replace(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[definition.method] = toOperation(name, definition, schemas);
  }
  schemas['Problem'] = toSchema(problemSchema, 'output', schemas);
  return {
    openapi: '3.1.0',
    info: {
      title: 'Brakeven',
      version,
      description:
        'Costs, timesheets and payback of a metal-fabrication shop. Decimals travel as text, dates of work as ' +
        'YYYY-MM-DD. Whatever is refused is answered with problem details (RFC 9457) that carry a code.',
    },
    servers: [{ url: '/api' }],
    paths,
    components: {
      schemas,
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: SESSION_COOKIE } },
    },
  };
}

function toOperation(name: string, definition: Endpoint, schemas: Json): Json {
  const { permission, summary } = definition;
  return {
    operationId: name,
    summary,
    tags: [definition.path.split('/')[1]],
    security: permission === null ? [] : [{ session: [] }],
    ...(permission === null ? {} : { 'x-permission': permission, 'x-roles': PERMISSIONS[permission] }),
    parameters: toParameters(definition, schemas),
    ...toRequestBody(definition, schemas),
    responses: {
      ...toAnswer(definition, schemas),
      default: {
        description: 'Refused',
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  };
}

function toParameters({ params, query, method, versioned }: Endpoint, schemas: Json): Json[] {
  const csrf = {
    name: CSRF_HEADER,
    in: 'header',
    required: true,
    description: 'What the cookie XSRF-TOKEN holds; GET /session hands it out.',
    schema: { type: 'string' },
  };
  const version = {
    name: 'If-Match',
    in: 'header',
    required: true,
    description: 'The ETag that the document was read with, or * to replace whatever is there.',
    schema: { type: 'string' },
  };
  return [
    ...listProperties(params, schemas).map((property) => ({ ...property, in: 'path', required: true })),
    ...listProperties(query, schemas).map((property) => ({ ...property, in: 'query' })),
    ...(method === 'get' ? [] : [csrf]),
    ...(method !== 'get' && versioned ? [version] : []),
  ];
}

function listProperties(schema: z.ZodType | undefined, schemas: Json): Json[] {
  if (!schema) return [];
  const { properties = {}, required = [] } = toSchema(schema, 'input', schemas) as {
    properties?: Json;
    required?: string[];
  };
  return Object.entries(properties).map(([name, property]) => ({
    name,
    required: required.includes(name),
    schema: property,
  }));
}

function toRequestBody({ body, upload }: Endpoint, schemas: Json): Json {
  if (upload) return { requestBody: { required: true, content: toUpload(body, schemas) } };
  if (!body) return {};
  const content = { 'application/json': { schema: toSchema(body, 'input', schemas) } };
  return { requestBody: { required: true, content } };
}

function toUpload(options: z.ZodType | undefined, schemas: Json): Json {
  const properties = {
    file: { type: 'string', contentMediaType: 'application/octet-stream' },
    ...(options ? { options: toSchema(options, 'input', schemas) } : {}),
  };
  return {
    'multipart/form-data': {
      schema: { type: 'object', properties, required: ['file'] },
      ...(options ? { encoding: { options: { contentType: 'application/json' } } } : {}),
    },
  };
}

function toAnswer({ response, versioned }: Endpoint, schemas: Json): Json {
  const headers = versioned && {
    headers: { ETag: { description: 'The version of the document.', schema: { type: 'string' } } },
  };
  if (response === null) return { 204: { description: 'Done', ...headers } };
  const content =
    typeof response === 'string'
      ? { [response]: { schema: { type: 'string' } } }
      : { 'application/json': { schema: toSchema(response, 'output', schemas) } };
  return { 200: { description: 'Answer', ...headers, content } };
}

/** A schema as JSON Schema; those with an id are put among the components and referred to. */
function toSchema(schema: z.ZodType, io: 'input' | 'output', schemas: Json): Json {
  const {
    $defs = {},
    $schema: _,
    ...root
  } = z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as {
    $defs?: Json;
    $schema?: string;
  } & Json;
  for (const [id, definition] of Object.entries($defs)) schemas[id] = withComponentRefs(definition);
  return withComponentRefs(root) as Json;
}

function withComponentRefs(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(withComponentRefs);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, inner]) => [
      key,
      key === '$ref' && typeof inner === 'string'
        ? inner.replace('#/$defs/', '#/components/schemas/')
        : withComponentRefs(inner),
    ]),
  );
}
