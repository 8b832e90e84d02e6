import { readFile } from 'node:fs/promises';

/** The bundled code of assembly.html, made by the build. */
export const loadPageCode = (): Promise<string> =>
  readFile(new URL('../documents/assembly/page.bundle.js', import.meta.url), 'utf8');
