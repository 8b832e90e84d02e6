import { readdirSync, readFileSync, statSync } from 'node:fs';
import { dirname, join, posix, relative, sep } from 'node:path';
import { expect, it } from 'vitest';

/** Floors of the house; a file imports from its own folder and from any lower floor, never from the floor's other folder. */
const FLOOR: Readonly<Record<string, number>> = {
  cli: 9,
  pipeline: 8,
  documents: 7,
  planning: 6,
  shaping: 5,
  strength: 4,
  statics: 3,
  detailing: 2,
  readers: 2,
  model: 1,
  maths: 0,
  machine: 0,
};

const SRC = join(import.meta.dirname, '..', 'src');

function filesBelow(folder: string): string[] {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    return statSync(path).isDirectory() ? filesBelow(path) : path.endsWith('.ts') ? [path] : [];
  });
}

const importsOf = (text: string): string[] =>
  [
    ...text.matchAll(/(?:^|[\s;])(?:import|export)\b[^'"();]*?\bfrom\s*'([^']+)'/g),
    ...text.matchAll(/\bimport\s*\(?\s*'([^']+)'/g),
  ].map((m) => m[1]!);

const roomOf = (path: string): string => relative(SRC, path).split(sep)[0]!;

/** Who may touch the machine: commands, the pipeline and the entries of worker threads. */
const mayUseMachine = (room: string): boolean => room === 'cli' || room === 'pipeline' || room === 'machine';

function faultsOf(path: string): string[] {
  const room = roomOf(path);
  const where = relative(SRC, path);
  if (where === 'index.ts') return [];
  const faults: string[] = [];
  if (!(room in FLOOR)) return [`${where}: not in a room of the house`];
  const text = readFileSync(path, 'utf8');
  for (const target of importsOf(text)) {
    if (target.startsWith('node:')) {
      if (room !== 'machine') faults.push(`${where}: ${target} belongs to machine`);
      continue;
    }
    if (!target.startsWith('.')) {
      if (target === 'manifold-3d' && room !== 'shaping') faults.push(`${where}: the solid kernel belongs to shaping`);
      continue;
    }
    if (!target.endsWith('.js')) faults.push(`${where}: ${target} lacks .js`);
    const other = roomOf(join(SRC, posix.join(relative(SRC, dirname(path)).split(sep).join('/'), target)));
    if (other === room) continue;
    if (other === 'machine' && !mayUseMachine(room)) faults.push(`${where}: only cli and pipeline use machine`);
    if (!(other in FLOOR) || FLOOR[other]! >= FLOOR[room]!) faults.push(`${where}: looks up at ${target}`);
  }
  if (
    room !== 'cli' &&
    /\b(console\.|process\.|Date\.now|new Date\(\)|performance\.now|Math\.random)/.test(stripComments(text)) &&
    room !== 'machine'
  )
    faults.push(`${where}: console, process, clock and chance belong to cli and machine`);
  return faults;
}

const stripComments = (text: string): string => text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/\/\/.*$/gm, '');

it('no floor looks up, and only the machine floor touches the machine', () => {
  expect(filesBelow(SRC).flatMap(faultsOf)).toEqual([]);
});

it('would notice a floor that looks up', () => {
  expect(importsOf("import { a } from '../pipeline/make.js';\nexport * from './b';")).toEqual([
    '../pipeline/make.js',
    './b',
  ]);
});
