// Writes the JSON Schemas of the two input files beside this script, from the built program: npm run build first.
import { writeFileSync } from 'node:fs';
import { jsonSchemas } from '../dist/model/json-schemas.js';

for (const [name, schema] of Object.entries(jsonSchemas()))
  writeFileSync(new URL(name, import.meta.url), `${JSON.stringify(schema, null, 2)}\n`);
