import { nodeSystem } from '../../detailing/systems/index.js';
import type { Assessment, MadeHub, MadePiece } from '../../documents/records.js';
import type { Spool } from '../../machine/memory-spool.js';
import { materialNamed } from '../../model/catalogue/resolve.js';
import type { Finding } from '../../model/finding.js';
import { isWithheld, settleFindings } from '../../model/hold.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart } from '../../model/parts.js';
import type { Run } from '../../model/run.js';
import type { ShapedHub, ShapedPiece } from '../../model/shaped.js';
import { digestOf } from '../digests.js';
import type { PackPart, PackWriter } from '../pack-writer.js';
import type { Lineage } from '../since.js';
import { type PrintablePiece, putAway } from './beds.js';
import { type CanonicalHub, canonicalHub, formOf, placeHub } from './canonical-hub.js';
import { PIECES, type ShapeHubInput, type ShapeHubOutput } from './shape-hub-task.js';

export interface MadeHubs {
  /** All hubs, each with the revision letter of its own last change. */
  readonly hubs: readonly HubPart[];
  readonly made: ReadonlyMap<string, MadeHub>;
  readonly findings: readonly Finding[];
  readonly parts: readonly PackPart[];
  readonly withheld: readonly string[];
  /** Pieces that may go on a bed, with their objects, in the hubs' order. */
  readonly printable: readonly PrintablePiece[];
}

/** Shapes every hub, writes the STL of each that is sound, and keeps only what papers and beds need of it. */
export async function makeHubs(
  a: Assessment,
  run: Run,
  writer: PackWriter,
  lineage: Lineage,
  spool: Spool,
): Promise<MadeHubs> {
  const made = new Map<string, MadeHub>();
  const findings: Finding[] = [];
  const parts: PackPart[] = [];
  const withheld: string[] = [];
  const printable: PrintablePiece[] = [];
  const tension = tensionOf(a);
  // Guides of wooden balls are printed too.
  const density = materialNamed(a.job, a.job.nodes.material)?.density ?? 0;
  const drafts = a.parts.hubs.map((hub, i) => ({
    ...draftOf(
      hub,
      a.job,
      hub.sockets.map((s) => tension.get(s.strut) ?? 0),
      lineage,
    ),
    object: 1 + i * PIECES,
  }));
  const again = drafts.filter((d) => !d.unchanged);
  for (const { part } of drafts.filter((d) => d.unchanged)) parts.push(...lineage.accessories(part.mark), part);
  await run.each<ShapeHubInput, ShapeHubOutput>(
    'shape-hub',
    again.map((d) => ({ ...d.input, object: d.object })),
    async (output, index) => {
      const { hub, part, toTruss } = again[index]!;
      const shaped = placeHub(output.shaped, toTruss);
      findings.push(...shaped.findings);
      const own = settleFindings([...a.findings.filter((f) => f.subject === hub.mark), ...shaped.findings], a.job, []);
      const whole = shaped.pieces.length > 0 || (hub.makeable && nodeSystem(hub.system)?.notPrinted === true);
      const keep = whole && !isWithheld('node', hub.mark, own.findings);
      const files: string[] = [];
      for (const [i, piece] of shaped.pieces.entries()) {
        if (!keep) continue;
        const path = `nodes/stl/${hub.mark}${piece.piece ? `.${piece.piece}` : ''}.stl`;
        await writer.put(path, output.stl[i]!);
        const kind = accessory(piece.piece);
        if (kind) parts.push({ ...part, mark: `${hub.mark}.${piece.piece}`, kind, files: [path] });
        else files.push(path);
        printable.push({
          mark: hub.mark,
          piece: piece.piece,
          box: piece.box,
          volume: piece.volume,
          mass: piece.volume * MM3_TO_M3 * density,
          footprint: output.views[i]!.footprint,
          load: await putAway(output.objects[i]!, output.views[i]!, spool),
        });
      }
      if (!keep) withheld.push(hub.mark);
      if (shaped.pieces.length > 0)
        made.set(hub.mark, {
          mark: hub.mark,
          pieces: shaped.pieces.map(withoutMesh),
          files,
          weakest: shaped.weakest ?? null,
        });
      const section = weakestRecord(shaped.weakest);
      parts.push(keep ? { ...part, files, ...section } : { ...part, digest: null, form: null, ...section });
      run.tell({ stage: 'Hubs', done: index + 1, total: again.length });
    },
  );
  const hubs = drafts.map(({ hub, part }) => ({ ...hub, revision: part.revision }));
  return { hubs, made, findings, parts, withheld, printable };
}

/** Meshes are written and dropped: thousands do not fit in memory. */
const withoutMesh = ({ positions, triangles, ...rest }: ShapedPiece): MadePiece => rest;

/** Square millimetres of the manifest: to 0.01. */
const area = (mm2: number): number => Math.round(mm2 * 100) / 100;

const weakestRecord = (w: ShapedHub['weakest']): Pick<PackPart, 'weakest_section'> =>
  w
    ? {
        weakest_section: { strut: w.strut, where: w.where, area_mm2: area(w.area), needed_mm2: area(w.needed) },
      }
    : {};

/** What a piece beside the node itself is; null: the node's own. */
function accessory(piece: string): 'cap' | 'guide' | null {
  if (piece.startsWith('cap-')) return 'cap';
  return piece.startsWith('guide-') ? 'guide' : null;
}

interface Draft extends CanonicalHub {
  readonly hub: HubPart;
  readonly part: PackPart;
  /** Made before, exactly so. */
  readonly unchanged: boolean;
}

/** A hub as it will be made: with the revision letter of its own last change on it. */
function draftOf(hub: HubPart, job: Job, tension: readonly number[], lineage: Lineage): Draft {
  const { input, toTruss } = canonicalHub(hub, job, tension);
  const digest = hub.makeable ? digestOf({ ...input, hub: { ...input.hub, revision: '' } }) : null;
  const revision = lineage.revision('node', hub.mark, digest);
  return {
    hub,
    toTruss,
    input: { ...input, hub: { ...input.hub, revision } },
    part: { mark: hub.mark, kind: 'node', digest, form: digest && digestOf(formOf(input)), revision, files: [] },
    unchanged: lineage.unchanged('node', hub.mark, digest),
  };
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
