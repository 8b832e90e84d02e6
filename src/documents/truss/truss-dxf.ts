import { DxfWriter, point3d, Units } from '@tarikjabiri/dxf';
import { distance, midpoint, type Vec3 } from '../../maths/vec3.js';
import type { Truss } from '../../model/truss.js';
import { layerName } from './truss-obj.js';

/** DXF colour indices: red, yellow, green, cyan, blue, magenta in turn for the layers of groups. */
const COLOURS = [1, 3, 5, 6, 4, 2];
const WHITE = 7;
const GREY = 8;
/** Height of letters as a share of the shortest strut. */
const LETTERS = 0.06;

/**
 * The truss as DXF in mm, z up: LINE a strut and a closed 3D polyline a face, on layers by group; marks as TEXT at middles and
 * nodes, on layers of their own, so that they can be switched off.
 */
export function writeTrussDxf(truss: Truss): string {
  const dxf = new DxfWriter();
  dxf.setUnits(Units.Millimeters);
  const layers = new Set<string>();
  const layer = (name: string, colour: number): string => {
    if (!layers.has(name)) dxf.addLayer(name, colour, 'Continuous');
    layers.add(name);
    return name;
  };
  const groupLayer = (kind: string, group: string | null): string =>
    layer(layerName(group === null ? kind : `${kind}-${group}`), COLOURS[layers.size % COLOURS.length]!);
  const at = new Map(truss.nodes.map((n) => [n.mark, n.at]));
  const place = (mark: string): Vec3 => at.get(mark)!;
  const point = (p: Vec3) => point3d(p[0], p[1], p[2]);
  const height = LETTERS * Math.min(...truss.members.map((m) => distance(place(m.ends[0]), place(m.ends[1]))), 1e6);
  const write = (mark: string, p: Vec3, layerOfMarks: string): void =>
    void dxf.addText(point(p), height, mark, {
      layerName: layer(layerOfMarks, layerOfMarks === 'MARKS-NODES' ? WHITE : GREY),
    });

  for (const m of truss.members) {
    const [a, b] = m.ends.map(place) as [Vec3, Vec3];
    dxf.addLine(point(a), point(b), { layerName: groupLayer('STRUTS', m.group) });
    write(m.mark, midpoint(a, b), 'MARKS-STRUTS');
  }
  for (const f of truss.faces) {
    const loop = f.nodes.map(place);
    dxf.addPolyline3D(
      loop.map((p) => ({ point: point(p) })),
      { flags: CLOSED, layerName: groupLayer('FACES', f.group) },
    );
    const sum = loop.reduce((s, p): Vec3 => [s[0] + p[0], s[1] + p[1], s[2] + p[2]], [0, 0, 0] as Vec3);
    write(f.mark, sum.map((v) => v / loop.length) as unknown as Vec3, 'MARKS-FACES');
  }
  for (const n of truss.nodes) write(n.mark, n.at, 'MARKS-NODES');
  return dxf.stringify();
}

/** POLYLINE, group code 70: 1 closed, 8 three-dimensional. */
const CLOSED = 1 | 8;
