import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { jsonSchemas } from '../../src/model/json-schemas.js';

it.each(Object.entries(jsonSchemas()))('templates/%s is what the program reads', (name, schema) => {
  const shipped = JSON.parse(readFileSync(new URL(`../../templates/${name}`, import.meta.url), 'utf8'));
  expect(shipped).toEqual(JSON.parse(JSON.stringify(schema)));
});

it('a point has exactly three numbers', () => {
  const text = JSON.stringify(jsonSchemas()['truss.schema.json']);
  expect(text).toContain('"minItems":3,"maxItems":3');
});

it('explains every key, for editors', () => {
  const bare: string[] = [];
  const walk = (schema: Record<string, unknown>, path: string): void => {
    for (const [key, value] of Object.entries(
      (schema['properties'] ?? {}) as Record<string, Record<string, unknown>>,
    )) {
      if (!value['description']) bare.push(`${path}.${key}`);
      walk(value, `${path}.${key}`);
    }
    for (const inner of [schema['items'], schema['additionalProperties'], ...((schema['anyOf'] as unknown[]) ?? [])])
      if (inner && typeof inner === 'object') walk(inner as Record<string, unknown>, `${path}[]`);
  };
  for (const [name, schema] of Object.entries(jsonSchemas())) walk(schema as Record<string, unknown>, name);
  expect(bare).toEqual([]);
});
