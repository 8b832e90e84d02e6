import type { Assessment, MadeHub } from '../documents/records.js';
import type { Job } from '../model/job/index.js';
import { VERSION } from '../model/version.js';
import type { Input } from './load.js';
import type { PackFile, PackPart } from './pack-writer.js';

/** The object of manifest.json, `strutwright-pack/1`. */
export interface Manifest {
  readonly format: 'strutwright-pack/1';
  readonly title: string;
  readonly revision: string;
  readonly date: string | null;
  readonly program: string;
  readonly status: 'clear' | 'flagged';
  /** Reasons of a hold, in words; empty: none. */
  readonly hold: readonly string[];
  /** Parts whose machine files are withheld, by mark. */
  readonly withheld: readonly string[];
  /** The earlier issue whose unchanged parts are not in this pack's machine files and plans. */
  readonly since?: { readonly title: string; readonly revision: string };
  readonly inputs: readonly Input[];
  /** State of the kerf in the sheets' machine files. */
  readonly kerf: { readonly kerf_mm: number; readonly measured: boolean; readonly compensated: 'here' | 'shop' };
  readonly totals: Totals;
  readonly parts: readonly PackPart[];
  /** All files but manifest.json. */
  readonly files: readonly PackFile[];
  /** What the papers are on and in; a comparison with a later pack follows it. */
  readonly papers: Pick<Job['output'], 'paper' | 'units' | 'fractions'>;
}

export interface Totals {
  readonly struts: number;
  readonly nodes: number;
  readonly panels: number;
  readonly strut_m: number;
  readonly strut_mass_kg: number;
  readonly node_mass_kg: number;
  readonly panel_mass_kg: number;
  readonly printed_volume_mm3: number;
  readonly panel_area_m2: number;
}

export function manifestOf(
  a: Assessment,
  hubs: ReadonlyMap<string, MadeHub>,
  made: {
    readonly inputs: readonly Input[];
    readonly parts: readonly PackPart[];
    readonly files: readonly PackFile[];
    readonly withheld: readonly string[];
    readonly since?: Manifest['since'];
  },
): Manifest {
  return {
    format: 'strutwright-pack/1',
    title: a.job.title,
    revision: a.job.revision,
    date: a.job.date,
    program: `strutwright ${VERSION}`,
    status: a.status,
    hold: a.hold,
    withheld: made.withheld,
    ...(made.since ? { since: made.since } : {}),
    inputs: made.inputs,
    kerf: {
      kerf_mm: a.job.cutter.kerf_mm,
      measured: a.job.cutter.kerfMeasured,
      compensated: a.job.cutter.compensate,
    },
    totals: totalsOf(a, hubs),
    parts: made.parts,
    files: made.files,
    papers: papersOf(a.job),
  };
}

/** What a job's papers are on and in. */
export const papersOf = ({ output: { paper, units, fractions } }: Job): Manifest['papers'] => ({
  paper,
  units,
  fractions,
});

const sum = <T>(items: Iterable<T>, of: (item: T) => number): number => {
  let total = 0;
  for (const item of items) total += of(item);
  return total;
};

const KG_PER_MM3 = 1e-9;

const volumeOf = (hub: MadeHub): number => sum(hub.pieces, (p) => p.volume);

function totalsOf(a: Assessment, made: ReadonlyMap<string, MadeHub>): Totals {
  const { struts, hubs, panels } = a.parts;
  return {
    struts: struts.length,
    nodes: hubs.length,
    panels: panels.length,
    strut_m: sum(struts, (s) => s.cutLength ?? 0) / 1000,
    strut_mass_kg: sum(struts, (s) => s.mass ?? 0),
    node_mass_kg: sum(hubs, (h) => {
      const solid = made.get(h.mark);
      // A drilled ball is turned, and what is printed is its guide.
      const own = solid?.pieces.filter((p) => !p.piece.startsWith('guide-')) ?? [];
      return own.length > 0 ? sum(own, (p) => p.volume) * h.material.density * KG_PER_MM3 : (h.mass ?? 0);
    }),
    panel_mass_kg: sum(panels, (p) => p.mass ?? 0),
    printed_volume_mm3: sum(made.values(), volumeOf),
    panel_area_m2: sum(panels, (p) => p.area) / 1e6,
  };
}
