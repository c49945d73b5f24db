import { type Endpoint } from './endpoint';
import { ENDPOINTS } from './endpoints';
import { createOpenApiDocument } from './openapi';

const document = createOpenApiDocument();
const endpoints = Object.entries<Endpoint>(ENDPOINTS);

interface Operation {
  operationId: string;
  parameters: { name: string; in: string; required?: boolean; schema: object }[];
  requestBody?: { content: Record<string, unknown> };
  responses: Record<string, { description: string; content?: Record<string, unknown> }>;
}
const operations = Object.entries(document.paths).flatMap(([path, methods]) =>
  Object.entries(methods).map(([method, operation]) => ({
    path,
    method,
    operation: operation as unknown as Operation,
  })),
);

describe('the OpenAPI document', () => {
  it('describes every endpoint of the contract once, under its own name', () => {
    const described = operations.map(({ operation }) => operation.operationId);
    expect(described.sort()).toEqual(endpoints.map(([name]) => name).sort());
  });

  it.each(endpoints)('tells path, parameters, body and answer of %s', (name, definition) => {
    const found = operations.find(({ operation }) => operation.operationId === name);
    expect(found?.method).toBe(definition.method);
    const inPath = [...(found?.path.matchAll(/\{(\w+)\}/g) ?? [])].map(([, parameter]) => parameter);
    const declared = found?.operation.parameters.filter((parameter) => parameter.in === 'path');
    expect(declared?.map((parameter) => parameter.name).sort()).toEqual(inPath.sort());
    expect(declared?.every((parameter) => parameter.required)).toBe(true);
    expect(Object.keys(found?.operation.requestBody?.content ?? {})).toEqual(listMediaTypes(definition));
    const status = definition.response === null ? '204' : '200';
    expect(Object.keys(found?.operation.responses ?? {})).toEqual([status, 'default']);
  });

  it('refers only to components that it holds', () => {
    const refs = [...JSON.stringify(document).matchAll(/"\$ref":"([^"]+)"/g)].map(([, ref]) => ref ?? '');
    expect(refs.length).toBeGreaterThan(0);
    for (const ref of refs) {
      const name = ref.replace('#/components/schemas/', '');
      expect(Object.keys(document.components.schemas)).toContain(name);
    }
  });

  it('has the parts that OpenAPI 3.1 demands, and schemas with a type JSON Schema knows', () => {
    expect(document.openapi).toBe('3.1.0');
    expect(document.info).toMatchObject({ title: 'Brakeven', version: '1' });
    const types = [...JSON.stringify(document).matchAll(/"type":"(\w+)"/g)].map(([, type]) => type);
    const known = ['string', 'number', 'integer', 'boolean', 'object', 'array', 'null', 'apiKey'];
    expect(types.filter((type) => !known.includes(type ?? ''))).toEqual([]);
  });

  it('survives being sent as JSON', () => {
    expect(JSON.parse(JSON.stringify(document))).toEqual(document);
  });
});

function listMediaTypes({ upload, body }: Endpoint): string[] {
  if (upload) return ['multipart/form-data'];
  return body ? ['application/json'] : [];
}
