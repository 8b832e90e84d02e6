// Bundles the page's code with three.js into one file of text: node src/documents/assembly/page/bundle.mjs, after tsc.
import { mkdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const out = fileURLToPath(new URL('../../../../dist/documents/assembly/page.bundle.js', import.meta.url));
mkdirSync(fileURLToPath(new URL('.', new URL(`file://${out}`))), { recursive: true });
await build({
  entryPoints: [fileURLToPath(new URL('main.ts', import.meta.url))],
  outfile: out,
  bundle: true,
  minify: true,
  format: 'iife',
  target: 'es2020',
  legalComments: 'inline',
  charset: 'utf8',
  logLevel: 'warning',
});
