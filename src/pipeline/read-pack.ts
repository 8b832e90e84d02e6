import { z } from 'zod';
import { FileFault } from '../machine/file-fault.js';
import { kindOf, readText } from '../machine/files.js';
import { basename, dirname, join } from '../machine/paths.js';
import { sayFault } from '../readers/fault.js';
import { parseJson } from '../readers/json-document.js';
import { checkSchema } from '../readers/schema-faults.js';

/** What later runs read of a manifest; what they do not know they pass over. */
const manifestSchema = z.looseObject({
  format: z.literal('strutwright-pack/1'),
  title: z.string(),
  revision: z.string(),
  date: z.string().nullable().default(null),
  parts: z.array(
    z.looseObject({
      mark: z.string(),
      kind: z.enum(['strut', 'node', 'panel', 'cap', 'guide', 'gauge']),
      digest: z.string().nullable(),
      form: z.string().nullable().default(null),
      revision: z.string().default('A'),
      files: z.array(z.string()).default([]),
    }),
  ),
  papers: z
    .looseObject({
      paper: z.enum(['A4', 'A3', 'Letter']).default('A4'),
      units: z.enum(['SI', 'US']).default('SI'),
      fractions: z.boolean().default(false),
    })
    .prefault({}),
});

export type ReadManifest = z.infer<typeof manifestSchema>;

/** A pack on disk. */
export interface ReadPack {
  readonly folder: string;
  readonly manifest: ReadManifest;
  /** The text of one of its files; null where it has none such. */
  text(path: string): Promise<string | null>;
}

const MOST_BYTES = 512_000_000;

/** Reads a pack by its folder or its manifest.json: the pack, or what keeps it from being one, one line each. */
export async function readPack(
  path: string,
): Promise<{ readonly pack: ReadPack } | { readonly faults: readonly string[] }> {
  try {
    const folder = basename(path) === 'manifest.json' && (await kindOf(path)) === 'file' ? dirname(path) : path;
    if ((await kindOf(join(folder, 'manifest.json'))) !== 'file')
      return { faults: [`${path}: is not a pack, since it has no manifest.json: give the folder of a pack`] };
    const name = join(folder, 'manifest.json');
    const document = parseJson(await readText(name, MOST_BYTES), name);
    const { value, faults } = checkSchema(document, manifestSchema);
    const all = [...document.faults, ...faults];
    if (!value || all.length > 0) return { faults: all.map(sayFault) };
    const text = async (file: string): Promise<string | null> =>
      (await kindOf(join(folder, file))) === 'file' ? readText(join(folder, file), MOST_BYTES) : null;
    return { pack: { folder, manifest: value, text } };
  } catch (error) {
    if (error instanceof FileFault) return { faults: [error.message] };
    throw error;
  }
}
