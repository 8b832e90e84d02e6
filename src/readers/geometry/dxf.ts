import { isFinite3, type Vec3 } from '../../maths/vec3.js';
import { bareLine, type RawGeometry, type RawLine, type RawLoop, type RawReading } from '../../model/raw-geometry.js';
import type { LengthUnit } from '../../model/units.js';
import type { Fault } from '../fault.js';
import { type DxfThing, dxfSections, numberOf, textOf } from './dxf-groups.js';
import { meshLoops } from './dxf-mesh.js';
import { lightPolyline, type Polyline, polyline } from './dxf-polyline.js';
import { groupName, LineFaults } from './text-lines.js';

/** $INSUNITS, AutoCAD DXF reference, header variables: the ones that a truss comes in. */
const UNITS: Readonly<Record<number, LengthUnit>> = { 1: 'in', 2: 'ft', 4: 'mm', 5: 'cm', 6: 'm' };

/**
 * Reads the model space of a DXF text file: LINE and open polylines as lines; 3DFACE, MESH, polyface and polygon meshes and
 * closed polylines as loops; layers kept; the unit from $INSUNITS; z is the elevation, so it points up.
 * The chord of a bulge is taken, and counted among what was left out; blocks are not opened.
 */
export function readDxf(text: string, name: string): RawReading<Fault> {
  const log = new LineFaults(name);
  const sections = log.tooLarge(text) ? null : dxfSections(text, log);
  if (!sections) return { geometry: null, faults: log.faults };
  const lines: RawLine[] = [];
  const loops: RawLoop[] = [];
  const leftOut = new Map<string, number>();
  const count = (what: string, by = 1): void => {
    if (by > 0) leftOut.set(what, (leftOut.get(what) ?? 0) + by);
  };
  const wrong = (thing: DxfThing): void =>
    log.tell(
      thing.line,
      `${thing.type} has a coordinate or an index that is not there or not finite`,
      'export it again',
    );

  const things = sections.get('ENTITIES') ?? [];
  for (let i = 0; i < things.length; i++) {
    const thing = things[i]!;
    const layer = groupName(textOf(thing, 8) ?? '');
    const shape = (drawn: Polyline | null): void => {
      if (!drawn) {
        wrong(thing);
        return;
      }
      count('curved part of a polyline, taken straight', drawn.bulges);
      if (drawn.closed && drawn.points.length >= 3) loops.push({ points: drawn.points, layer });
      else
        for (let k = 1; k < drawn.points.length; k++)
          lines.push(bareLine(drawn.points[k - 1]!, drawn.points[k]!, layer));
      for (const loop of drawn.faces) loops.push({ points: loop, layer });
    };
    // Paper space is the sheet, not the model.
    const onPaper = numberOf(thing, 67) === 1;
    if (thing.type === 'POLYLINE') {
      const vertices: DxfThing[] = [];
      while (things[i + 1]?.type === 'VERTEX') vertices.push(things[++i]!);
      if (things[i + 1]?.type === 'SEQEND') i++;
      if (onPaper) count('POLYLINE in paper space');
      else shape(polyline(thing, vertices));
    } else if (onPaper) count(`${thing.type} in paper space`);
    else if (thing.type === 'LINE') {
      const ends = [corner(thing, 0), corner(thing, 1)] as const;
      if (ends.every(isFinite3)) lines.push(bareLine(...ends, layer));
      else wrong(thing);
    } else if (thing.type === 'LWPOLYLINE') shape(lightPolyline(thing));
    else if (thing.type === '3DFACE') {
      const four = [0, 1, 2, 3].map((k) => corner(thing, k));
      const points = four.filter((p, k) => k === 0 || !same(p, four[k - 1]!));
      if (points.length > 1 && same(points[0]!, points.at(-1)!)) points.pop();
      if (!four.every(isFinite3)) wrong(thing);
      else if (points.length >= 3) loops.push({ points, layer });
      else count('3DFACE of no area');
    } else if (thing.type === 'MESH') {
      const mesh = meshLoops(thing);
      if (mesh) for (const points of mesh) loops.push({ points, layer });
      else wrong(thing);
    } else if (thing.type !== '' && thing.type !== 'ENDSEC') count(thing.type);
  }
  const geometry: RawGeometry = { unit: unitOf(sections.get('HEADER')), up: 'z', points: [], lines, loops, leftOut };
  return { geometry: log.faults.length === 0 ? geometry : null, faults: log.faults };
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
