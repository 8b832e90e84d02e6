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
