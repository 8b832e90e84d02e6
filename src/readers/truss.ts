import { scale, type Vec3 } from '../maths/vec3.js';
import type { Truss } from '../model/truss.js';
import { type TrussFile, trussFileSchema } from '../model/truss-file.js';
import { LENGTH_IN_MM } from '../model/units.js';
import type { Fault } from './fault.js';
import { parseJson } from './json-document.js';
import { inOrder } from './order.js';
import { checkSchema } from './schema-faults.js';
import { checkTruss } from './truss-checks.js';

/**
 * Reads a truss file, `strutwright-truss/1`: the truss in mm, N and rad, or null with every fault of the file in the
 * order of its lines. `name` is what the faults call the file. Never throws. The job's scale is applied by `scaleTruss`.
 */
export function readTruss(
  text: string,
  name: string,
): { readonly truss: Truss | null; readonly faults: readonly Fault[] } {
  const document = parseJson(text, name);
  if (document.value === undefined) return { truss: null, faults: document.faults };
  const { value, faults } = checkSchema(document, trussFileSchema);
  const all = inOrder([...document.faults, ...faults, ...checkTruss(document)]);
  return { truss: value && all.length === 0 ? trussOf(value) : null, faults: all };
}

function trussOf(file: TrussFile): Truss {
  const mm = LENGTH_IN_MM[file.units];
  const at = (p: Vec3): Vec3 => scale(p, mm);
  return {
    nodes: file.nodes.map((n) => ({ mark: n.id, at: at(n.at) })),
    members: file.members.map((m) => ({
      mark: m.id,
      ends: m.ends,
      force: m.force ?? null,
      section: m.section ?? null,
      area: m.area_mm2 ?? null,
      modulus: m.modulus_MPa ?? null,
      roll: m.roll_deg === undefined ? null : (m.roll_deg * Math.PI) / 180,
      group: m.group ?? null,
    })),
    faces: (file.faces ?? []).map((f) => ({
      mark: f.id,
      nodes: f.nodes,
      panel: f.panel ?? false,
      group: f.group ?? null,
    })),
    cells: (file.cells ?? []).map((c) => ({ mark: c.id, faces: c.faces })),
    reciprocal: file.reciprocal
      ? {
          newtonPerArea: file.reciprocal.newtonPerArea / mm ** 2,
          vertices: file.reciprocal.vertices.map((v) => ({ cell: v.cell, at: at(v.at) })),
        }
      : null,
    supports: joinSupports(file),
    loads: (file.loads ?? []).map((l) => ({ case: l.case, node: l.node, force: l.force })),
  };
}

/** One support a node: a node that is named twice is held in every direction that either names. */
function joinSupports(file: TrussFile): Truss['supports'] {
  const fixed = new Map<string, string>();
  for (const s of file.supports ?? []) fixed.set(s.node, (fixed.get(s.node) ?? '') + s.fixed);
  return [...fixed].map(([node, held]) => ({
    node,
    fixed: { x: held.includes('x'), y: held.includes('y'), z: held.includes('z') },
  }));
}
