import type { Job } from '../../model/job/index.js';
import type { Point2 } from '../../model/parts.js';
import type { BedItem, BedPlan, PlannedBed } from '../../model/plan.js';
import { type Box, type Floor, placeOn } from './place-on.js';

export type Printer = Job['printers'][number];

/** What is known of a piece when its bed is planned. */
export interface PrintPiece {
  readonly mark: string;
  readonly piece: string;
  /** x, y, z of its box as it is printed, mm. */
  readonly box: readonly [number, number, number];
  /** mm³ */
  readonly volume: number;
  /** kg */
  readonly mass: number;
  /** Convex outline from above, from the box's corner, mm; absent: the box. */
  readonly footprint?: readonly Point2[];
}

/** Usable area of a printer's bed. */
export const floorOf = (printer: Printer): Floor => ({
  shape: printer.bed,
  width: printer.width_mm - 2 * printer.margin_mm,
  depth: (printer.bed === 'circle' ? printer.width_mm : printer.depth_mm) - 2 * printer.margin_mm,
});

/** Whether a piece fits a printer by itself. */
export function fitsPrinter(box: readonly [number, number, number], printer: Printer): boolean {
  return box[2] <= printer.height_mm && placeOn(floorOf(printer), [], { width: box[0], depth: box[1] }, 0) !== null;
}

/** A bed to which this many later pieces could not be added is full: bounds the search for thousands of pieces. */
const REFUSALS = 60;

interface OpenBed {
  readonly printer: Printer;
  readonly floor: Floor;
  readonly boxes: Box[];
  readonly items: { readonly item: BedItem; readonly of: PrintPiece }[];
  refusals: number;
}

/**
 * Pieces arranged on the printers' beds: largest first, each on the first bed that has room, at the place nearest the front left
 * corner (of a circle: nearest its middle), a new bed on the first printer in the job's order that takes it. Boxes keep the printer's
 * spacing. Pieces are placed by their boxes, in the plan's own order of size and mark, so that the same pieces give the same beds.
 */
export function planBeds(pieces: readonly PrintPiece[], printers: readonly Printer[]): BedPlan {
  const order = [...pieces].sort(
    (a, b) =>
      b.box[0] * b.box[1] - a.box[0] * a.box[1] ||
      (a.mark < b.mark ? -1 : a.mark > b.mark ? 1 : 0) ||
      (a.piece < b.piece ? -1 : 1),
  );
  const beds: OpenBed[] = [];
  const unplaced: string[] = [];
  for (const piece of order) {
    if (!beds.some((bed) => bed.refusals < REFUSALS && put(bed, piece))) {
      const printer = printers.find((p) => fitsPrinter(piece.box, p));
      if (!printer) {
        unplaced.push(piece.mark);
        continue;
      }
      const bed: OpenBed = { printer, floor: floorOf(printer), boxes: [], items: [], refusals: 0 };
      put(bed, piece);
      beds.push(bed);
    }
  }
  return { beds: beds.map(closed), unplaced };
}

function put(bed: OpenBed, piece: PrintPiece): boolean {
  const [width, depth, height] = piece.box;
  const spot =
    height > bed.printer.height_mm ? null : placeOn(bed.floor, bed.boxes, { width, depth }, bed.printer.spacing_mm);
  if (!spot) {
    bed.refusals++;
    return false;
  }
  bed.boxes.push(spot);
  const { margin_mm: margin } = bed.printer;
  bed.items.push({
    item: {
      mark: piece.mark,
      piece: piece.piece,
      x: spot.x + margin,
      y: spot.y + margin,
      turned: spot.turned,
      box: piece.box,
      volume: piece.volume,
      mass: piece.mass,
      outline: outlineAt(piece, spot, margin),
    },
    of: piece,
  });
  return true;
}

/** The footprint where it lies: a quarter turn about the corner carries it to the left by its depth. */
function outlineAt(piece: PrintPiece, spot: Box, margin: number): Point2[] {
  const [width, depth] = piece.box;
  const outline: readonly Point2[] = piece.footprint ?? [
    [0, 0],
    [width, 0],
    [width, depth],
    [0, depth],
  ];
  return outline.map(([x, y]) =>
    spot.turned ? [spot.x + margin + depth - y, spot.y + margin + x] : [spot.x + margin + x, spot.y + margin + y],
  );
}

function closed(bed: OpenBed, index: number): PlannedBed {
  const { printer } = bed;
  const volume = bed.items.reduce((sum, { of }) => sum + of.volume, 0);
  const layers = Math.ceil(Math.max(...bed.items.map(({ of }) => of.box[2])) / printer.layer_mm);
  return {
    mark: `bed-${String(index + 1).padStart(2, '0')}`,
    printer: printer.name,
    shape: printer.bed,
    width: printer.width_mm,
    depth: printer.bed === 'circle' ? printer.width_mm : printer.depth_mm,
    items: bed.items.map(({ item }) => item),
    volume,
    mass: bed.items.reduce((sum, { of }) => sum + of.mass, 0),
    layers,
    time: volume / printer.flow_mm3_per_s + layers * printer.layerChange_s,
    flow: printer.flow_mm3_per_s,
    layerChange: printer.layerChange_s,
    layer: printer.layer_mm,
  };
}
