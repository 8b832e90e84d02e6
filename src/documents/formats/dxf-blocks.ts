import { MODEL_RECORD, PAPER_RECORD } from './dxf-handles.js';
import type { Pair } from './dxf-pairs.js';

/** The BLOCKS section of a drawing without blocks: model and paper space. */
export const blocksSection = (): Pair[] => [
  [0, 'SECTION'],
  [2, 'BLOCKS'],
  ...block(MODEL_RECORD, '*Model_Space', '20', '21'),
  ...block(PAPER_RECORD, '*Paper_Space', '1C', '1D'),
  [0, 'ENDSEC'],
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
