import { areaVector, fitPlane } from '../maths/plane-fit.js';
import { cross, dot, length, mean, negate, perpendicular, subtract, type Vec3 } from '../maths/vec3.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import { ROUND_OFF } from '../model/tolerance.js';
import type { Topology } from '../model/topology.js';
import { sizeOf } from '../model/topology.js';
import { type Face, OUTSIDE_CELL, type Truss } from '../model/truss.js';
import { loopShape } from './loop-shape.js';

/** One face as a plane figure. */
export interface FaceForm {
  readonly mark: string;
  readonly panel: boolean;
  /** Mean of the corners, mm; the plane passes through it. */
  readonly origin: Vec3;
  /** Unit normal to the outside (see `outwardNormal`); null where the corners lie on one line. */
  readonly normal: Vec3 | null;
  /** Largest distance of a corner from the total-least-squares plane through the corners' mean, mm. */
  readonly flatness: number;
  /** Area of the loop, mm² (length of its area vector: of a twisted loop, its largest shadow). */
  readonly area: number;
  readonly convex: boolean;
  readonly crossesItself: boolean;
}

export interface FaceLimits {
  /** mm. */
  readonly flatnessWarn: number;
  /** mm; null: flatness never stops. */
  readonly flatnessStop: number | null;
  /** mm: a panel out of flat by more is told of once, where panels are made, with what was done about it; absent: here. */
  readonly panelsFrom?: number;
}

/** Flatness, outward normal, convexity and self-crossing of every face, with the findings they give rise to. */
export function faceForms(
  topology: Topology,
  limits: FaceLimits,
): { readonly forms: readonly FaceForm[]; readonly findings: readonly Finding[] } {
  const { truss } = topology;
  const size = sizeOf(truss);
  const centre = mean(truss.nodes.map((n) => n.at));
  const outsideOf = outsideFaces(truss);
  const forms = truss.faces.map((face) => faceForm(topology, face, size, centre, outsideOf));
  return { forms, findings: forms.flatMap((form) => faceFindings(form, limits)) };
}

function faceForm(
  topology: Topology,
  face: Face,
  size: number,
  centre: Vec3,
  outsideOf: ReadonlyMap<string, readonly string[]>,
): FaceForm {
  const loop = face.nodes.map((mark) => topology.at(mark));
  const fit = fitPlane(loop);
  if (!fit || fit.spread[1] <= ROUND_OFF.coincident.value * size) {
    return {
      mark: face.mark,
      panel: face.panel,
      origin: mean(loop),
      normal: null,
      flatness: fit?.flatness ?? 0,
      area: 0,
      convex: false,
      crossesItself: false,
    };
  }
  const x = perpendicular(fit.normal);
  const y = cross(fit.normal, x);
  const flat = loop.map((p) => {
    const d = subtract(p, fit.origin);
    return [dot(d, x), dot(d, y)] as const;
  });
  const towards = outwardHint(topology, face, outsideOf.get(face.mark)) ?? subtract(fit.origin, centre);
  return {
    mark: face.mark,
    panel: face.panel,
    origin: fit.origin,
    normal: outwardNormal(fit.normal, towards, size),
    flatness: fit.flatness,
    area: length(areaVector(loop)),
    ...loopShape(flat, ROUND_OFF.coincident.value * size),
  };
}

/**
 * The side of a plane that counts as outside: away from the middle of the bounded cell behind the face where cells
 * are known, else away from the middle of all nodes; where the plane passes through that middle, the right-hand
 * side of the face's own loop.
 */
function outwardNormal(normal: Vec3, towards: Vec3, size: number): Vec3 {
  const side = dot(normal, towards);
  return side < -ROUND_OFF.coincident.value * size ? negate(normal) : normal;
}

/** From the middle of the one bounded cell behind a face to the face; undefined for a face between two bounded cells. */
function outwardHint(topology: Topology, face: Face, cellNodes: readonly string[] | undefined): Vec3 | undefined {
  if (!cellNodes) return undefined;
  const inside = mean(cellNodes.map((mark) => topology.at(mark)));
  return subtract(mean(face.nodes.map((mark) => topology.at(mark))), inside);
}

/** Nodes of the bounded cell behind each face that has exactly one. */
function outsideFaces(truss: Truss): ReadonlyMap<string, readonly string[]> {
  const byMark = new Map(truss.faces.map((face) => [face.mark, face]));
  const cellsOf = new Map<string, string[][]>();
  for (const cell of truss.cells) {
    if (cell.mark === OUTSIDE_CELL) continue;
    const nodes = [...new Set(cell.faces.flatMap((mark) => byMark.get(mark)?.nodes ?? []))];
    for (const mark of cell.faces) cellsOf.set(mark, [...(cellsOf.get(mark) ?? []), nodes]);
  }
  return new Map([...cellsOf].flatMap(([mark, cells]) => (cells.length === 1 ? [[mark, cells[0]!] as const] : [])));
}

function faceFindings(form: FaceForm, limits: FaceLimits): Finding[] {
  const kind = form.panel ? ('panel' as const) : ('face' as const);
  if (!form.normal) return [finding('face-has-no-normal', form.mark, { kind })];
  const found: Finding[] = [];
  const toldWithPanels = form.panel && limits.panelsFrom !== undefined && form.flatness > limits.panelsFrom;
  if (limits.flatnessStop !== null && form.flatness > limits.flatnessStop && !toldWithPanels) {
    found.push(
      finding('face-not-flat', form.mark, {
        kind,
        level: 'stop',
        value: form.flatness,
        limit: limits.flatnessStop,
      }),
    );
  } else if (form.flatness > limits.flatnessWarn && !toldWithPanels) {
    found.push(finding('face-not-flat', form.mark, { kind, value: form.flatness, limit: limits.flatnessWarn }));
  }
  if (form.crossesItself) found.push(finding('face-crosses-itself', form.mark, { kind }));
  else if (!form.convex) found.push(finding('face-not-convex', form.mark, { kind }));
  return found;
}
