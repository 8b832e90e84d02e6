import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import DxfParser from 'dxf-parser';
import { describe, expect, it } from 'vitest';
import { drawingToDxf } from '../../../src/documents/formats/dxf.js';
import { drawingToSvg } from '../../../src/documents/formats/svg.js';
import { type Drawing, straightLine } from '../../../src/documents/kit/drawing.js';

/** A plate 100 x 60 with a half-round end and a hole; invented. */
const drawing: Drawing = {
  title: 'Plate & hole',
  width: 600,
  height: 400,
  layers: [
    {
      name: 'ENGRAVE',
      colour: '#1b7837',
      purpose: 'engrave',
      lines: [
        straightLine(
          [
            [20, 20],
            [40, 20],
          ],
          false,
        ),
      ],
    },
    {
      name: 'CUT-INSIDE',
      colour: '#542788',
      purpose: 'inside',
      lines: [
        {
          closed: true,
          corners: [
            { x: 45, y: 30, bulge: 1 },
            { x: 55, y: 30, bulge: 1 },
          ],
        },
      ],
    },
    {
      name: 'CUT-OUTSIDE',
      colour: '#b35806',
      purpose: 'outside',
      lines: [
        {
          closed: true,
          corners: [
            { x: 0, y: 0, bulge: 0 },
            { x: 100, y: 0, bulge: 1 },
            { x: 100, y: 60, bulge: 0 },
            { x: 0, y: 60, bulge: 0 },
          ],
        },
      ],
    },
  ],
};

describe('DXF', () => {
  it('is read back with layers, millimetres, closed contours and bulges', () => {
    const dxf = new DxfParser().parseSync(drawingToDxf(drawing))!;
    expect(dxf.header['$ACADVER']).toBe('AC1015');
    expect(dxf.header['$INSUNITS']).toBe(4);
    expect(Object.keys(dxf.tables.layer.layers)).toEqual(['0', 'ENGRAVE', 'CUT-INSIDE', 'CUT-OUTSIDE']);
    const colours = Object.values(dxf.tables.layer.layers).map((l) => l.colorIndex);
    expect(new Set(colours).size).toBe(4);
    const plate = dxf.entities.find((e) => e.layer === 'CUT-OUTSIDE') as unknown as {
      shape: boolean;
      vertices: { x: number; y: number; bulge?: number }[];
    };
    expect(plate.shape).toBe(true);
    expect(plate.vertices.map((v) => [v.x, v.y, v.bulge ?? 0])).toEqual([
      [0, 0, 0],
      [100, 0, 1],
      [100, 60, 0],
      [0, 60, 0],
    ]);
    expect(dxf.entities.every((e) => e.type === 'LWPOLYLINE')).toBe(true);
  });

  // An independent reader, where the machine has it (Debian: python3-ezdxf).
  const has = spawnSync('/usr/bin/python3', ['-c', 'import ezdxf']).status === 0;
  it.skipIf(!has)('passes the audit of ezdxf, with the area of plate and half disc', () => {
    const path = join(mkdtempSync(join(tmpdir(), 'dxf-')), 'plate.dxf');
    writeFileSync(path, drawingToDxf(drawing));
    const script = [
      'import sys, ezdxf',
      'from ezdxf.path import make_path',
      'from ezdxf.math import area',
      'd = ezdxf.readfile(sys.argv[1]); a = d.audit()',
      'p = [e for e in d.modelspace() if e.dxf.layer == "CUT-OUTSIDE"][0]',
      'print(d.dxfversion, d.units, len(a.errors), len(a.fixes), round(area(make_path(p).flattening(0.0001)), 1))',
    ].join('\n');
    const said = execFileSync('/usr/bin/python3', ['-c', script, path], { encoding: 'utf8' }).trim();
    expect(said).toMatch(/^AC1015 4 0 0 /);
    // That reader draws arcs by cubic curves, 3e-4 of a radius off.
    expect(Number(said.split(' ')[4])).toBeCloseTo(6000 + (Math.PI * 900) / 2, -1);
  });
});

describe('SVG', () => {
  it('is at true size, in mm alone, in the order of cutting', () => {
    const svg = drawingToSvg(drawing);
    expect(svg).toContain('width="600mm" height="400mm" viewBox="0 0 600 400"');
    expect(svg).not.toMatch(/px/);
    expect([...svg.matchAll(/<g id="([^"]+)"/g)].map((m) => m[1])).toEqual(['ENGRAVE', 'CUT-INSIDE', 'CUT-OUTSIDE']);
    expect(svg).toContain('M0 400L100 400A30 30 0 0 0 100 340L0 340Z');
    expect(svg).toContain('Plate &amp; hole');
  });

  const has = spawnSync('rsvg-convert', ['--version']).status === 0;
  it.skipIf(!has)('is drawn by librsvg at 600 x 400 mm with the arc bulging outward', () => {
    const out = execFileSync('rsvg-convert', ['--dpi-x', '25.4', '--dpi-y', '25.4', '-f', 'png'], {
      input: drawingToSvg(drawing),
    });
    expect([out.readUInt32BE(16), out.readUInt32BE(20)]).toEqual([600, 400]);
  });
});
