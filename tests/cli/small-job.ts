import { createHash } from 'node:crypto';
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/** An invented tripod with feet of its own, the least that makes a whole pack: three struts, four hubs. */
const TRUSS = {
  format: 'strutwright-truss/1',
  units: 'mm',
  nodes: [
    { id: 'A', at: [0, 0, 0] },
    { id: 'B', at: [300, 0, 0] },
    { id: 'C', at: [150, 260, 0] },
    { id: 'D', at: [150, 90, 240] },
  ],
  members: ['A', 'B', 'C'].map((foot, k) => ({ id: `S${k + 1}`, ends: [foot, 'D'] })),
};

/** Writes a small job and its truss into `folder`; the title stands in every paper of the pack. */
export function writeSmallJob(folder: string, title: string): void {
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, 'truss.json'), JSON.stringify(TRUSS));
  writeFileSync(
    join(folder, 'job.json'),
    JSON.stringify({ format: 'strutwright-job/1', title, truss: 'truss.json', struts: { section: 'beech-8' } }),
  );
}

/** The title of a pack that is whole: every file that its manifest names is there as it says, and no other. Throws otherwise. */
export function wholePack(folder: string): string {
  const manifest = JSON.parse(readFileSync(join(folder, 'manifest.json'), 'utf8'));
  const there = (readdirSync(folder, { recursive: true, withFileTypes: true }) as import('node:fs').Dirent[])
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name).slice(folder.length + 1))
    .filter((path) => path !== 'manifest.json')
    .sort();
  const named = manifest.files.map((f: { path: string }) => f.path).sort();
  if (JSON.stringify(there) !== JSON.stringify(named)) throw new Error(`${folder} has ${there} and names ${named}`);
  for (const { path, sha256 } of manifest.files) {
    const found = createHash('sha256')
      .update(readFileSync(join(folder, path)))
      .digest('hex');
    if (found !== sha256) throw new Error(`${path} is not what its manifest says`);
  }
  return manifest.title;
}
