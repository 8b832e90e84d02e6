import type { Drawing } from '../kit/drawing.js';

/**
 * A drawing as DXF of the year 2000 (AC1015), by the open DXF reference: millimetres ($INSUNITS 4), one layer a
 * purpose, LWPOLYLINE with bulges for arcs, no splines, no text entities, no line twice. ASCII, CR LF.
 */
export function drawingToDxf(drawing: Drawing): string {
  const out: string[] = [];
  const put = (...pairs: readonly (readonly [number, string | number])[]): void => {
    for (const [code, value] of pairs)
      out.push(String(code), typeof value === 'number' ? formatNumber(code, value) : value);
  };
  let next = 0x100;
  const handle = (): string => (next++).toString(16).toUpperCase();
  const layers = [{ name: '0', colour: '#000000' }, ...drawing.layers];

  const body: (readonly [number, string | number])[] = [];
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
      );
      body.push([90, line.corners.length], [70, line.closed ? 1 : 0]);
      for (const c of line.corners) {
        body.push([10, c.x], [20, c.y]);
        if (c.bulge !== 0) body.push([42, c.bulge]);
      }
    }
  const colours = colourIndices(layers.map((l) => l.colour));
  const layerRecords = layers.map(
    (layer, i) =>
      [
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
      ] as const,
  );

  put([0, 'SECTION'], [2, 'HEADER']);
  put(
    [9, '$ACADVER'],
    [1, 'AC1015'],
    [9, '$DWGCODEPAGE'],
    [3, 'ANSI_1252'],
    [9, '$INSUNITS'],
    [70, 4],
    [9, '$MEASUREMENT'],
    [70, 1],
  );
  put([9, '$EXTMIN'], [10, 0], [20, 0], [30, 0], [9, '$EXTMAX'], [10, drawing.width], [20, drawing.height], [30, 0]);
  put([9, '$LIMMIN'], [10, 0], [20, 0], [9, '$LIMMAX'], [10, drawing.width], [20, drawing.height]);
  put([9, '$HANDSEED'], [5, next.toString(16).toUpperCase()], [0, 'ENDSEC']);
  put([0, 'SECTION'], [2, 'CLASSES'], [0, 'ENDSEC']);

  put([0, 'SECTION'], [2, 'TABLES']);
  table(put, 'VPORT', '8', 0, []);
  table(put, 'LTYPE', '5', 3, [
    lineType('14', 'ByBlock', ''),
    lineType('15', 'ByLayer', ''),
    lineType('16', 'Continuous', 'Solid line'),
  ]);
  table(put, 'LAYER', LAYER_TABLE, layers.length, layerRecords);
  table(put, 'STYLE', '3', 1, [
    [
      [0, 'STYLE'],
      [5, '11'],
      [330, '3'],
      [100, 'AcDbSymbolTableRecord'],
      [100, 'AcDbTextStyleTableRecord'],
      [2, 'Standard'],
      [70, 0],
      [40, 0],
      [41, 1],
      [50, 0],
      [71, 0],
      [42, 2.5],
      [3, 'txt'],
      [4, ''],
    ],
  ]);
  table(put, 'VIEW', '6', 0, []);
  table(put, 'UCS', '7', 0, []);
  table(put, 'APPID', '9', 1, [
    [
      [0, 'APPID'],
      [5, '12'],
      [330, '9'],
      [100, 'AcDbSymbolTableRecord'],
      [100, 'AcDbRegAppTableRecord'],
      [2, 'ACAD'],
      [70, 0],
    ],
  ]);
  put(
    [0, 'TABLE'],
    [2, 'DIMSTYLE'],
    [5, 'A'],
    [330, '0'],
    [100, 'AcDbSymbolTable'],
    [70, 0],
    [100, 'AcDbDimStyleTable'],
    [71, 0],
    [0, 'ENDTAB'],
  );
  table(put, 'BLOCK_RECORD', '1', 2, [
    blockRecord(MODEL_RECORD, '*Model_Space', '22'),
    blockRecord('1B', '*Paper_Space', '1E'),
  ]);
  put([0, 'ENDSEC']);

  put([0, 'SECTION'], [2, 'BLOCKS']);
  put(...block(MODEL_RECORD, '*Model_Space', '20', '21'), ...block('1B', '*Paper_Space', '1C', '1D'));
  put([0, 'ENDSEC']);

  put([0, 'SECTION'], [2, 'ENTITIES'], ...body, [0, 'ENDSEC']);

  put([0, 'SECTION'], [2, 'OBJECTS']);
  put([0, 'DICTIONARY'], [5, 'C'], [330, '0'], [100, 'AcDbDictionary'], [281, 1]);
  put([3, 'ACAD_GROUP'], [350, 'D'], [3, 'ACAD_LAYOUT'], [350, '1A'], [3, 'ACAD_PLOTSTYLENAME'], [350, 'E']);
  put([0, 'DICTIONARY'], [5, 'D'], [330, 'C'], [100, 'AcDbDictionary'], [281, 1]);
  put(
    [0, 'ACDBDICTIONARYWDFLT'],
    [5, 'E'],
    [330, 'C'],
    [100, 'AcDbDictionary'],
    [281, 1],
    [3, 'Normal'],
    [350, PLOT_STYLE],
    [100, 'AcDbDictionaryWithDefault'],
    [340, PLOT_STYLE],
  );
  put([0, 'ACDBPLACEHOLDER'], [5, PLOT_STYLE], [330, 'E']);
  put(
    [0, 'DICTIONARY'],
    [5, '1A'],
    [330, 'C'],
    [100, 'AcDbDictionary'],
    [281, 1],
    [3, 'Model'],
    [350, '22'],
    [3, 'Layout1'],
    [350, '1E'],
  );
  put(...layout('22', 'Model', MODEL_RECORD, 0, 1024), ...layout('1E', 'Layout1', '1B', 1, 0));
  put([0, 'ENDSEC'], [0, 'EOF']);
  return `${out.join('\r\n')}\r\n`;
}

type Pair = readonly [number, string | number];

const MODEL_RECORD = '1F';
const LAYER_TABLE = '2';
const PLOT_STYLE = 'F';

/** Whole numbers in the codes that hold integers, else decimals to a millionth. */
function formatNumber(code: number, value: number): string {
  const whole = (code >= 60 && code <= 99) || (code >= 270 && code <= 289) || (code >= 370 && code <= 389);
  if (whole) return String(Math.round(value));
  const text = value.toFixed(6).replace(/0+$/, '');
  return text === '-0.' ? '0.0' : text.endsWith('.') ? `${text}0` : text;
}

function table(
  put: (...pairs: Pair[]) => void,
  name: string,
  handle: string,
  count: number,
  records: readonly (readonly Pair[])[],
): void {
  put([0, 'TABLE'], [2, name], [5, handle], [330, '0'], [100, 'AcDbSymbolTable'], [70, count]);
  for (const record of records) put(...record);
  put([0, 'ENDTAB']);
}

const lineType = (handle: string, name: string, words: string): Pair[] => [
  [0, 'LTYPE'],
  [5, handle],
  [330, '5'],
  [100, 'AcDbSymbolTableRecord'],
  [100, 'AcDbLinetypeTableRecord'],
  [2, name],
  [70, 0],
  [3, words],
  [72, 65],
  [73, 0],
  [40, 0],
];

const blockRecord = (handle: string, name: string, layoutHandle: string): Pair[] => [
  [0, 'BLOCK_RECORD'],
  [5, handle],
  [330, '1'],
  [100, 'AcDbSymbolTableRecord'],
  [100, 'AcDbBlockTableRecord'],
  [2, name],
  [340, layoutHandle],
];

const block = (record: string, name: string, begin: string, end: string): Pair[] => [
  [0, 'BLOCK'],
  [5, begin],
  [330, record],
  [100, 'AcDbEntity'],
  ...(name === '*Paper_Space' ? ([[67, 1]] as const) : []),
  [8, '0'],
  [100, 'AcDbBlockBegin'],
  [2, name],
  [70, 0],
  [10, 0],
  [20, 0],
  [30, 0],
  [3, name],
  [1, ''],
  [0, 'ENDBLK'],
  [5, end],
  [330, record],
  [100, 'AcDbEntity'],
  ...(name === '*Paper_Space' ? ([[67, 1]] as const) : []),
  [8, '0'],
  [100, 'AcDbBlockEnd'],
];

const layout = (handle: string, name: string, record: string, order: number, flags: number): Pair[] => [
  [0, 'LAYOUT'],
  [5, handle],
  [330, '1A'],
  [100, 'AcDbPlotSettings'],
  [1, ''],
  [2, 'none_device'],
  [4, ''],
  [6, ''],
  [40, 0],
  [41, 0],
  [42, 0],
  [43, 0],
  [44, 0],
  [45, 0],
  [46, 0],
  [47, 0],
  [48, 0],
  [49, 0],
  [140, 0],
  [141, 0],
  [142, 1],
  [143, 1],
  [70, 688 + flags],
  [72, 1],
  [73, 0],
  [74, 5],
  [7, ''],
  [75, 16],
  [147, 1],
  [148, 0],
  [149, 0],
  [100, 'AcDbLayout'],
  [1, name],
  [70, 1],
  [71, order],
  [10, 0],
  [20, 0],
  [11, 420],
  [21, 297],
  [12, 0],
  [22, 0],
  [32, 0],
  [14, 0],
  [24, 0],
  [34, 0],
  [15, 0],
  [25, 0],
  [35, 0],
  [146, 0],
  [13, 0],
  [23, 0],
  [33, 0],
  [16, 1],
  [26, 0],
  [36, 0],
  [17, 0],
  [27, 1],
  [37, 0],
  [76, 0],
  [330, record],
];

/** For each colour the nearest of the first eight of the DXF colour index that no earlier, different colour has taken. */
function colourIndices(colours: readonly string[]): number[] {
  const taken = new Map<string, number>();
  return colours.map((hex) => {
    const known = taken.get(hex);
    if (known !== undefined) return known;
    const rgb = [1, 3, 5].map((i) => Number.parseInt(hex.slice(i, i + 2), 16));
    const free = BASE_COLOURS.map((_, i) => i + 1).filter((i) => ![...taken.values()].includes(i));
    const off = (i: number): number => BASE_COLOURS[i - 1]!.reduce((sum, v, k) => sum + (v - rgb[k]!) ** 2, 0);
    const index = free.length > 0 ? free.reduce((a, b) => (off(b) < off(a) ? b : a)) : 7;
    taken.set(hex, index);
    return index;
  });
}

/** Red, yellow, green, cyan, blue, magenta, black (or white, on a black ground), grey. */
const BASE_COLOURS: readonly (readonly [number, number, number])[] = [
  [255, 0, 0],
  [255, 255, 0],
  [0, 255, 0],
  [0, 255, 255],
  [0, 0, 255],
  [255, 0, 255],
  [0, 0, 0],
  [128, 128, 128],
];
