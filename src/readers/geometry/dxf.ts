import { isFinite3, type Vec3 } from '../../maths/vec3.js';
import { isUsable } from '../../model/limits.js';
import { bareLine, type RawGeometry, type RawLine, type RawLoop, type RawReading } from '../../model/raw-geometry.js';
import type { LengthUnit } from '../../model/units.js';
import type { Fault } from '../fault.js';
import { type DxfThing, dxfSections, numberOf } from './dxf-groups.js';
import type { Place } from './dxf-insert.js';
import { meshLoops } from './dxf-mesh.js';
import { lightPolyline, type Polyline, polyline } from './dxf-polyline.js';
import { walkDxf } from './dxf-walk.js';
import { groupName, LineFaults } from './text-lines.js';

/** $INSUNITS, AutoCAD DXF reference, header variables: the ones that a truss comes in. */
const UNITS: Readonly<Record<number, LengthUnit>> = { 1: 'in', 2: 'ft', 4: 'mm', 5: 'cm', 6: 'm' };

/**
 * Reads the model space of a DXF text file: LINE and open polylines as lines; 3DFACE, MESH, polyface and polygon meshes and
 * closed polylines as loops; blocks opened; layers kept; the unit from $INSUNITS; z is the elevation, so it points up.
 * The chord of a bulge is taken, and counted among what was left out, as is every other entity by its name.
 */
export function readDxf(text: string, name: string): RawReading<Fault> {
  const log = new LineFaults(name);
  const sections = log.tooLarge(text) ? null : dxfSections(text, log);
  if (!sections) return { geometry: null, faults: log.faults };
  const lines: RawLine[] = [];
  const loops: RawLoop[] = [];
  const leftOut = new Map<string, number>();
  const leave = (what: string, by = 1): void => {
    if (by > 0) leftOut.set(what, (leftOut.get(what) ?? 0) + by);
  };
  walkDxf(sections, log, leave, ({ thing, vertices, layer: onLayer, place }) => {
    const layer = groupName(onLayer);
    const raw = shapeOf(thing, vertices);
    const drawn = raw && placed(raw, place);
    if (drawn === undefined) leave(thing.type);
    else if (drawn === null)
      log.tell(
        thing.line,
        `${thing.type} has a coordinate or an index that is not there or not finite`,
        'export it again',
      );
    else {
      leave('curved part of a polyline, taken straight', drawn.bulges);
      if (drawn.closed && drawn.points.length >= 3) loops.push({ points: drawn.points, layer });
      else
        for (let k = 1; k < drawn.points.length; k++)
          lines.push(bareLine(drawn.points[k - 1]!, drawn.points[k]!, layer));
      for (const points of drawn.faces) loops.push({ points, layer });
      if (drawn.points.length === 0 && drawn.faces.length === 0) leave(`${thing.type} of no extent`);
    }
  });
  const geometry: RawGeometry = { unit: unitOf(sections.get('HEADER')), up: 'z', points: [], lines, loops, leftOut };
  return { geometry: log.faults.length === 0 ? geometry : null, faults: log.faults };
}

/** The same in the axes of the model; null where its blocks' scales make it larger than what is reckoned with. */
function placed(drawn: Polyline, place: Place): Polyline | null {
  const points = drawn.points.map(place);
  const faces = drawn.faces.map((face) => face.map(place));
  return [points, ...faces].every((list) => list.every((p) => p.every(isUsable))) ? { ...drawn, points, faces } : null;
}

/** An entity as a polyline and faces, in its block's axes; null: not finite; undefined: no line and no face. */
function shapeOf(thing: DxfThing, vertices: readonly DxfThing[]): Polyline | null | undefined {
  const bare = { closed: false, bulges: 0, faces: [] };
  switch (thing.type) {
    case 'LINE': {
      const points = [corner(thing, 0), corner(thing, 1)];
      return points.every(isFinite3) ? { ...bare, points } : null;
    }
    case 'LWPOLYLINE':
      return lightPolyline(thing);
    case 'POLYLINE':
      return polyline(thing, vertices);
    case '3DFACE': {
      const four = [0, 1, 2, 3].map((k) => corner(thing, k));
      const points = four.filter((p, k) => k === 0 || !same(p, four[k - 1]!));
      if (points.length > 1 && same(points[0]!, points.at(-1)!)) points.pop();
      if (!four.every(isFinite3)) return null;
      return { ...bare, points: [], faces: points.length >= 3 ? [points] : [] };
    }
    case 'MESH': {
      const faces = meshLoops(thing);
      return faces && { ...bare, points: [], faces };
    }
    default:
      return undefined;
  }
}

/** Point k of an entity: group codes 10+k, 20+k, 30+k; z may be left out. */
function corner(thing: DxfThing, k: number): Vec3 {
  return [numberOf(thing, 10 + k, Number.NaN), numberOf(thing, 20 + k, Number.NaN), numberOf(thing, 30 + k)];
}

const same = (a: Vec3, b: Vec3): boolean => a[0] === b[0] && a[1] === b[1] && a[2] === b[2];

function unitOf(header: readonly DxfThing[] | undefined): LengthUnit | null {
  for (const thing of header ?? []) {
    const at = thing.groups.findIndex((g) => g.code === 9 && g.text === '$INSUNITS');
    const value = at < 0 ? undefined : thing.groups[at + 1];
    if (value?.code === 70) return UNITS[Number(value.text)] ?? null;
  }
  return null;
}
