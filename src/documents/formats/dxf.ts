import type { Drawing } from '../kit/drawing.js';
import { blocksSection } from './dxf-blocks.js';
import { colourIndices } from './dxf-colours.js';
import { FIRST_FREE, LAYER_TABLE, MODEL_RECORD, PLOT_STYLE } from './dxf-handles.js';
import { objectsSection } from './dxf-objects.js';
import { type Pair, pairsToText } from './dxf-pairs.js';
import { tablesSection } from './dxf-tables.js';

/**
 * A drawing as DXF of the year 2000 (AC1015), by the open DXF reference: millimetres ($INSUNITS 4), one layer a
 * purpose, LWPOLYLINE with bulges for arcs, no splines, no text entities, no line twice. ASCII, CR LF.
 */
export function drawingToDxf(drawing: Drawing): string {
  let next = FIRST_FREE;
  const handle = (): string => (next++).toString(16).toUpperCase();
  const entities = entitiesOf(drawing, handle);
  const layers = layersOf(drawing, handle);
  return pairsToText([
    ...header(drawing, handle()),
    [0, 'SECTION'],
    [2, 'CLASSES'],
    [0, 'ENDSEC'],
    ...tablesSection(layers),
    ...blocksSection(),
    [0, 'SECTION'],
    [2, 'ENTITIES'],
    ...entities,
    [0, 'ENDSEC'],
    ...objectsSection(),
    [0, 'EOF'],
  ]);
}

/** `seed`: the next free handle. */
const header = (drawing: Drawing, seed: string): Pair[] => [
  [0, 'SECTION'],
  [2, 'HEADER'],
  [9, '$ACADVER'],
  [1, 'AC1015'],
  [9, '$DWGCODEPAGE'],
  [3, 'ANSI_1252'],
  [9, '$INSUNITS'],
  [70, 4],
  [9, '$MEASUREMENT'],
  [70, 1],
  [9, '$EXTMIN'],
  [10, 0],
  [20, 0],
  [30, 0],
  [9, '$EXTMAX'],
  [10, drawing.width],
  [20, drawing.height],
  [30, 0],
  [9, '$LIMMIN'],
  [10, 0],
  [20, 0],
  [9, '$LIMMAX'],
  [10, drawing.width],
  [20, drawing.height],
  [9, '$HANDSEED'],
  [5, seed],
  [0, 'ENDSEC'],
];

function entitiesOf(drawing: Drawing, handle: () => string): Pair[] {
  const body: Pair[] = [];
  for (const layer of drawing.layers)
    for (const line of layer.lines) {
      if (line.corners.length < 2) continue;
      body.push(
        [0, 'LWPOLYLINE'],
        [5, handle()],
        [330, MODEL_RECORD],
        [100, 'AcDbEntity'],
        [8, layer.name],
        [100, 'AcDbPolyline'],
        [90, line.corners.length],
        [70, line.closed ? 1 : 0],
      );
      for (const c of line.corners) {
        body.push([10, c.x], [20, c.y]);
        if (c.bulge !== 0) body.push([42, c.bulge]);
      }
    }
  return body;
}

function layersOf(drawing: Drawing, handle: () => string): Pair[][] {
  const layers = [{ name: '0', colour: '#000000' }, ...drawing.layers];
  const colours = colourIndices(layers.map((l) => l.colour));
  return layers.map((layer, i): Pair[] => [
    [0, 'LAYER'],
    [5, handle()],
    [330, LAYER_TABLE],
    [100, 'AcDbSymbolTableRecord'],
    [100, 'AcDbLayerTableRecord'],
    [2, layer.name],
    [70, 0],
    [62, colours[i]!],
    [6, 'Continuous'],
    [370, -3],
    [390, PLOT_STYLE],
  ]);
}
