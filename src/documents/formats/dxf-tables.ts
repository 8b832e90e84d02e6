import { LAYER_TABLE, MODEL_LAYOUT, MODEL_RECORD, PAPER_LAYOUT, PAPER_RECORD } from './dxf-handles.js';
import type { Pair } from './dxf-pairs.js';

/** The TABLES section with the records that readers of the year 2000's form ask for; `layers`: one LAYER record each. */
export const tablesSection = (layers: readonly (readonly Pair[])[]): Pair[] => [
  [0, 'SECTION'],
  [2, 'TABLES'],
  ...table('VPORT', '8', 0, []),
  ...table('LTYPE', '5', 3, [
    lineType('14', 'ByBlock', ''),
    lineType('15', 'ByLayer', ''),
    lineType('16', 'Continuous', 'Solid line'),
  ]),
  ...table('LAYER', LAYER_TABLE, layers.length, layers),
  ...table('STYLE', '3', 1, [
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
  ]),
  ...table('VIEW', '6', 0, []),
  ...table('UCS', '7', 0, []),
  ...table('APPID', '9', 1, [
    [
      [0, 'APPID'],
      [5, '12'],
      [330, '9'],
      [100, 'AcDbSymbolTableRecord'],
      [100, 'AcDbRegAppTableRecord'],
      [2, 'ACAD'],
      [70, 0],
    ],
  ]),
  [0, 'TABLE'],
  [2, 'DIMSTYLE'],
  [5, 'A'],
  [330, '0'],
  [100, 'AcDbSymbolTable'],
  [70, 0],
  [100, 'AcDbDimStyleTable'],
  [71, 0],
  [0, 'ENDTAB'],
  ...table('BLOCK_RECORD', '1', 2, [
    blockRecord(MODEL_RECORD, '*Model_Space', MODEL_LAYOUT),
    blockRecord(PAPER_RECORD, '*Paper_Space', PAPER_LAYOUT),
  ]),
  [0, 'ENDSEC'],
];

function table(name: string, handle: string, count: number, records: readonly (readonly Pair[])[]): Pair[] {
  return [
    [0, 'TABLE'],
    [2, name],
    [5, handle],
    [330, '0'],
    [100, 'AcDbSymbolTable'],
    [70, count],
    ...records.flat(),
    [0, 'ENDTAB'],
  ];
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
