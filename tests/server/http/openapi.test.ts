import { beforeAll, describe, expect, it } from 'vitest';
import { EVERY_ENDPOINT } from '#shared/contract/http/every-endpoint.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer } from '#tests/support/test-server.ts';

type Json = null | boolean | number | string | Json[] | { [key: string]: Json };
type Operation = {
  operationId: string;
  summary: string;
  parameters?: { name: string; in: string; required?: boolean; schema: object }[];
  requestBody?: { content: Record<string, { schema: object }> };
  responses: Record<string, { description: string; content?: Record<string, { schema: object }> }>;
};
type Description = { openapi: string; info: object; paths: Record<string, Record<string, Operation>> } & {
  [key: string]: Json;
};

let description: Description;
beforeAll(async () => {
  const server = await startTestServer(await openTestPools());
  const { status, body } = await server.ask('GET', '/api/openapi.json');
  expect(status).toBe(200);
  description = body;
});

const operations = () =>
  Object.entries(description.paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({ path, method, operation })),
  );

/** Every schema of the description, wherever it stands. */
function* schemasIn(value: Json): Generator<{ [key: string]: Json }> {
  if (Array.isArray(value)) for (const one of value) yield* schemasIn(one);
  else if (typeof value === 'object' && value !== null) {
    if (typeof value.schema === 'object' && value.schema !== null && !Array.isArray(value.schema)) yield value.schema;
    for (const one of Object.values(value)) yield* schemasIn(one);
  }
}

describe('the interface description', () => {
  it('is OpenAPI 3.1 and names exactly the endpoints there are', () => {
    expect(description.openapi).toMatch(/^3\.1\.\d+$/);
    expect(description.info).toMatchObject({ title: 'Millrace', version: '1' });
    const named = operations().map(({ method, path }) => `${method.toUpperCase()} ${path}`);
    const there = EVERY_ENDPOINT.map(({ method, path }) => `${method} ${path.replace(/:(\w+)/g, '{$1}')}`);
    expect(named.sort()).toEqual(there.sort());
  });

  it('gives every operation a name of its own, a summary, and an answer with a shape', () => {
    const ids = operations().map(({ operation }) => operation.operationId);
    expect(new Set(ids).size).toBe(ids.length);
    for (const { operation } of operations()) {
      expect(operation.summary.length).toBeGreaterThan(3);
      const statuses = Object.keys(operation.responses);
      expect(statuses).toContain('default');
      for (const [status, { content, description: text }] of Object.entries(operation.responses)) {
        expect(text).not.toBe('');
        if (status !== '204') expect(Object.values(content ?? {})[0]?.schema).toBeDefined();
      }
      expect(operation.responses.default?.content).toHaveProperty('application/problem+json');
    }
  });

  it('describes every parameter in a path, as required', () => {
    for (const { path, operation } of operations()) {
      const inPath = [...path.matchAll(/\{(\w+)\}/g)].map((match) => match[1]);
      const described = (operation.parameters ?? []).filter((parameter) => parameter.in === 'path');
      expect(described.map(({ name }) => name)).toEqual(inPath);
      for (const { required } of described) expect(required).toBe(true);
    }
  });

  it('points at nothing that is not in it, and names a type or an alternative in every schema', () => {
    const text = JSON.stringify(description);
    for (const [, pointer = ''] of text.matchAll(/"\$ref":"#\/([^"]+)"/g)) {
      const target = pointer
        .split('/')
        .reduce<Json | undefined>(
          (value, key) =>
            typeof value === 'object' && value !== null && !Array.isArray(value) ? value[key] : undefined,
          description,
        );
      expect([pointer, target === undefined]).toEqual([pointer, false]);
    }
    let count = 0;
    for (const schema of schemasIn(description)) {
      expect(
        Object.keys(schema).some((key) => ['type', 'anyOf', 'oneOf', 'allOf', '$ref', 'const', 'enum'].includes(key)),
      ).toBe(true);
      count += 1;
    }
    expect(count).toBeGreaterThan(40);
  });

  it('says which headers a change that overwrites and a creation take', () => {
    const headersOf = (method: string, path: string) =>
      (description.paths[path]?.[method]?.parameters ?? [])
        .filter((one) => one.in === 'header')
        .map(({ name, required }) => [name, required ?? false]);
    expect(headersOf('post', '/api/devices/{deviceId}/secret')).toEqual([['If-Match', true]]);
    expect(headersOf('post', '/api/devices')).toEqual([['Idempotency-Key', false]]);
  });
});
