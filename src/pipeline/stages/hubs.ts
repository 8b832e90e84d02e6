import type { Assessment, MadeHub } from '../../documents/records.js';
import { sha256 } from '../../machine/hash.js';
import type { Finding } from '../../model/finding.js';
import { isWithheld, settleFindings } from '../../model/hold.js';
import type { Run } from '../../model/run.js';
import type { PackPart, PackWriter } from '../pack-writer.js';
import type { PrintablePiece } from './beds.js';
import { PIECES, type ShapeHubInput, type ShapeHubOutput } from './shape-hub-task.js';

export interface MadeHubs {
  readonly made: ReadonlyMap<string, MadeHub>;
  readonly findings: readonly Finding[];
  readonly parts: readonly PackPart[];
  readonly withheld: readonly string[];
  /** Pieces that may go on a bed, with their objects, in the hubs' order. */
  readonly printable: readonly PrintablePiece[];
}

/** Shapes every hub, writes the STL of each that is sound, and keeps only what papers and beds need of it. */
export async function makeHubs(a: Assessment, run: Run, writer: PackWriter): Promise<MadeHubs> {
  const made = new Map<string, MadeHub>();
  const findings: Finding[] = [];
  const parts: PackPart[] = [];
  const withheld: string[] = [];
  const printable: PrintablePiece[] = [];
  const tension = tensionOf(a);
  const inputs = a.parts.hubs.map(
    (hub, i): ShapeHubInput => ({
      hub,
      job: a.job,
      tension: hub.sockets.map((s) => tension.get(s.strut) ?? 0),
      object: 1 + i * PIECES,
    }),
  );
  await run.each<ShapeHubInput, ShapeHubOutput>('shape-hub', inputs, async ({ shaped, stl, objects }, index) => {
    const hub = a.parts.hubs[index]!;
    findings.push(...shaped.findings);
    const own = settleFindings([...a.findings.filter((f) => f.subject === hub.mark), ...shaped.findings], a.job, []);
    const keep = shaped.pieces.length > 0 && !isWithheld('node', hub.mark, own.findings);
    const files: string[] = [];
    for (const [i, piece] of shaped.pieces.entries()) {
      if (!keep) continue;
      const path = `nodes/stl/${hub.mark}${piece.piece ? `.${piece.piece}` : ''}.stl`;
      await writer.put(path, stl[i]!);
      files.push(path);
      printable.push({
        mark: hub.mark,
        piece: piece.piece,
        box: piece.box,
        volume: piece.volume,
        mass: piece.volume * MM3_TO_M3 * hub.material.density,
        object: objects[i]!,
      });
    }
    if (!keep) withheld.push(hub.mark);
    if (shaped.pieces.length > 0) made.set(hub.mark, { mark: hub.mark, pieces: shaped.pieces, files });
    parts.push({
      mark: hub.mark,
      kind: 'node',
      digest: keep ? sha256([hub.material.name, ...stl.map(sha256)].join(' ')) : null,
      files,
    });
    run.tell({ stage: 'Hubs', done: index + 1, total: inputs.length });
  });
  return { made, findings, parts, withheld, printable };
}

const MM3_TO_M3 = 1e-9;

/** Largest tension of each strut over everything that was computed, N; what the print orientation weighs. */
function tensionOf(a: Assessment): ReadonlyMap<string, number> {
  const tension = new Map<string, number>();
  a.topology.truss.members.forEach((m, i) => {
    let most = Math.max(0, a.forces?.values[i] ?? 0);
    for (const action of a.solution?.actions[i] ?? []) most = Math.max(most, action.axial);
    tension.set(m.mark, most);
  });
  return tension;
}
