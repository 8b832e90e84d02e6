import { writeJson } from '../formats/json.js';
import type { PackRecords } from '../records.js';
import { sayKerf } from './kerf.js';

/** nesting.json: every sheet with where its panels stand, the yields, the proven lower bound and the state of the kerf. */
export function nestingJson(records: PackRecords): Uint8Array {
  const { nesting, job } = records;
  const sheets = nesting?.sheets ?? [];
  const area = sheets.reduce((sum, s) => sum + s.width * s.height, 0);
  return writeJson({
    format: 'strutwright-nesting/1',
    spacing_mm: job.cutter.spacing_mm,
    margin_mm: job.cutter.margin_mm,
    kerf: {
      kerf_mm: job.cutter.kerf_mm,
      measured: job.cutter.kerfMeasured,
      compensated: job.cutter.compensate,
      says: sayKerf(job.cutter),
    },
    sheets: sheets.map((s) => ({
      mark: s.mark,
      sheet: s.sheet,
      width_mm: s.width,
      height_mm: s.height,
      material: s.material,
      thickness_mm: s.thickness,
      yield: s.yield,
      placements: s.placements.map((p) => ({ mark: p.mark, x: p.x, y: p.y, rotation_deg: p.rotation_deg })),
    })),
    yield: area > 0 ? sheets.reduce((sum, s) => sum + s.yield * s.width * s.height, 0) / area : null,
    lowerBound: nesting?.lowerBound ?? null,
    ...(nesting?.stopped ? { stopped: nesting.stopped } : {}),
  });
}
