import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { assemblyHtml } from '../../src/documents/assembly/assembly-html.js';
import type { PackRecords } from '../../src/documents/records.js';
import { planAssembly } from '../../src/planning/assembly/plan-assembly.js';
import { packRecords } from '../documents/pack-records.js';
import { trussOf } from '../helpers/truss.js';

const BUNDLE = join(import.meta.dirname, '..', '..', 'dist', 'documents', 'assembly', 'page.bundle.js');

/** The building page of records, written to a file of its own; its steps are planned where they have none. */
export function writePage(records: PackRecords): string {
  const path = join(mkdtempSync(join(tmpdir(), 'strutwright-guide-')), 'assembly.html');
  const assembly = records.assembly ?? planAssembly(records as Parameters<typeof planAssembly>[0]).plan;
  writeFileSync(path, assemblyHtml({ ...records, assembly }, readFileSync(BUNDLE, 'utf8'), 'guide'));
  return path;
}

/** Forces of the ladder's rungs from the lowest up, N (invented). */
export const RUNGS = [-100, -25, 100, 0] as const;

/**
 * An upright ladder with rungs of known forces and posts without, invented: nothing stands before the middle of a rung, so that
 * a column of the picture's pixels crosses the four of them and nothing else. It balances nothing, which is a finding.
 */
export const ladder = (): PackRecords =>
  packRecords(
    {},
    trussOf({
      nodes: RUNGS.flatMap((_, k) => [
        [0, 0, 200 * k],
        [600, 0, 200 * k],
      ]),
      edges: [
        ...RUNGS.map((_, k) => [2 * k, 2 * k + 1]),
        ...[0, 1, 2].flatMap((k) => [
          [2 * k, 2 * k + 2],
          [2 * k + 1, 2 * k + 3],
        ]),
      ],
      forces: [...RUNGS, 0, 0, 0, 0, 0, 0],
    }),
  );
