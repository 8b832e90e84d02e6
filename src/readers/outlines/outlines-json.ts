import type { Point2 } from '../../model/parts.js';
import { type Fault, quoted } from '../fault.js';
import { parseJson } from '../json-document.js';
import type { OutlinesReading, ReadOutline } from './outline.js';

/**
 * Outlines of a JSON file as a pack's panels/outlines.json has them: `{ MARK: { outline: [[x, y] ...], holes?: [...],
 * quantity?: 1, rotations?: [degrees] } }`, mm. Other keys of a panel are left alone.
 */
export function readJsonOutlines(text: string, name: string): OutlinesReading {
  const document = parseJson(text, name);
  const faults: Fault[] = [...document.faults];
  const leftOut = new Map<string, number>();
  const value = document.value;
  if (faults.length > 0) return { outlines: [], faults, leftOut };
  if (typeof value !== 'object' || value === null || Array.isArray(value))
    return {
      outlines: [],
      leftOut,
      faults: [
        document.fault(
          0,
          'is not an object of panels by mark',
          'write { "P1": { "outline": [[0, 0], [100, 0], [100, 50]] } }',
        ),
      ],
    };
  const tell = (path: readonly PropertyKey[], what: string, mend: string): void =>
    void faults.push(document.fault(document.offset(path), what, mend));
  const outlines = Object.entries(value).flatMap(([mark, given]): ReadOutline[] => {
    if (typeof given !== 'object' || given === null || !isPoints((given as { outline?: unknown }).outline)) {
      tell([mark], `${quoted(mark)} has no outline of at least three points`, 'give "outline": [[x, y], ...] in mm');
      return [];
    }
    const {
      outline,
      holes = [],
      quantity = 1,
      rotations,
    } = given as { outline: Point2[]; holes?: unknown; quantity?: unknown; rotations?: unknown };
    if (!Array.isArray(holes) || !holes.every(isPoints))
      tell([mark, 'holes'], `${quoted(mark)} has holes that are no lists of points`, 'give each hole as [[x, y], ...]');
    if (!Number.isInteger(quantity) || (quantity as number) < 0)
      tell([mark, 'quantity'], `${quoted(mark)} has a quantity that is no whole number`, 'give 0, 1, 2 ...');
    if (
      rotations !== undefined &&
      !(Array.isArray(rotations) && rotations.length > 0 && rotations.every((r) => typeof r === 'number'))
    )
      tell(
        [mark, 'rotations'],
        `${quoted(mark)} has rotations that are no list of degrees`,
        'give [0, 90], or leave it out',
      );
    return [
      {
        mark,
        outline,
        holes: holes as Point2[][],
        quantity: quantity as number,
        ...(rotations ? { rotations: rotations as number[] } : {}),
      },
    ];
  });
  if (outlines.length === 0 && faults.length === 0)
    faults.push(document.fault(0, 'holds no panel', 'give at least one'));
  return { outlines, faults, leftOut };
}

const isPoints = (v: unknown): v is Point2[] =>
  Array.isArray(v) &&
  v.length >= 3 &&
  v.every((p) => Array.isArray(p) && p.length === 2 && p.every((c) => typeof c === 'number' && Number.isFinite(c)));
