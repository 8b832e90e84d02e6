import { DECIMALS, writeCsv } from '../formats/csv.js';
import { writeJson } from '../formats/json.js';
import type { PackRecords } from '../records.js';

/** assembly/fit-up.csv: one row a strut, always: its spread, its play and what the worst loop asks of that; blank where it was not computed. */
export function fitUpCsv(records: PackRecords): Uint8Array {
  const fits = new Map((records.fitUp?.struts ?? []).map((s) => [s.mark, s]));
  const of =
    (key: 'deviation_mm' | 'play_mm' | 'share' | 'locked_N' | 'sideways_mm' | 'aside_mm' | 'needed_mm') =>
    (s: { mark: string }) =>
      fits.get(s.mark)?.[key] ?? null;
  return writeCsv(
    [
      { name: 'mark', value: (s) => s.mark },
      { name: 'deviation_mm', decimals: DECIMALS.length, value: of('deviation_mm') },
      { name: 'play_mm', decimals: DECIMALS.length, value: of('play_mm') },
      { name: 'share', decimals: DECIMALS.ratio, value: of('share') },
      { name: 'locked_N', decimals: DECIMALS.force, value: of('locked_N') },
      { name: 'sideways_mm', decimals: DECIMALS.length, value: of('sideways_mm') },
      { name: 'aside_mm', decimals: DECIMALS.length, value: of('aside_mm') },
      { name: 'play_needed_mm', decimals: DECIMALS.length, value: of('needed_mm') },
    ],
    records.parts.struts,
    records.job.output.csv,
  );
}

/** assembly/fit-up.json: chances, loops and the tolerance that the saw needs. */
export function fitUpJson(records: PackRecords): Uint8Array {
  const f = records.fitUp;
  return writeJson({
    format: 'strutwright-fit-up/1',
    samples: f?.samples ?? null,
    chance: f?.chance ?? null,
    chanceBound: f?.chanceBound ?? null,
    wanted: f?.wanted ?? null,
    cutNeeded_mm: f?.cutNeeded_mm ?? null,
    movedMost: f?.movedMost ?? null,
    loops: f?.loops ?? [],
  });
}
