import type { Point2 } from './parts.js';

/** Bars with their cuts, lengths in mm, prices in the job's currency. */
export interface StockPlan {
  readonly bars: readonly PlannedBar[];
  readonly cost: number;
  readonly lowerBound: number;
  readonly proven: boolean;
  /** Cost, bound and proof by section. */
  readonly sections: readonly SectionPlan[];
  readonly stopped?: 'time';
}

export interface SectionPlan {
  readonly section: string;
  readonly bars: number;
  readonly cost: number;
  readonly lowerBound: number;
  readonly proven: boolean;
}

export interface PlannedBar {
  /** B001, B002 ... in the order of sawing. */
  readonly mark: string;
  readonly section: string;
  /** Name of the kind of bar, or the mark of the offcut in the rack. */
  readonly stock: string;
  readonly length: number;
  readonly price: number;
  readonly fromRack: boolean;
  /** In sawing order, longest first. */
  readonly cuts: readonly { readonly mark: string; readonly length: number }[];
  /** What is left in one piece, mm; kept for the rack where it is long enough. */
  readonly offcut: number;
  readonly kept: boolean;
}

/** Sheets with the panels on them; mm and degrees as in nesting.json. */
export interface NestingPlan {
  readonly sheets: readonly PlannedSheet[];
  readonly lowerBound: number;
  readonly stopped?: 'time';
}

export interface PlannedSheet {
  /** sheet-01, sheet-02 ...: also the name of its files. */
  readonly mark: string;
  readonly width: number;
  readonly height: number;
  readonly material: string;
  readonly thickness: number;
  /** Name of the kind of sheet. */
  readonly sheet: string;
  readonly placements: readonly {
    readonly mark: string;
    readonly x: number;
    readonly y: number;
    readonly rotation_deg: number;
  }[];
  readonly yield: number;
}

/** Print beds with the pieces on them, bed after bed in printing order. */
export interface BedPlan {
  readonly beds: readonly PlannedBed[];
  /** Pieces that fit no printer, by node mark. */
  readonly unplaced: readonly string[];
}

export interface PlannedBed {
  /** bed-01, bed-02 ...: also the name of its file. */
  readonly mark: string;
  readonly printer: string;
  readonly shape: 'rectangle' | 'circle';
  /** Usable size, mm; a circle's diameter both ways. */
  readonly width: number;
  readonly depth: number;
  readonly items: readonly BedItem[];
  /** Sum of the pieces' volumes, mm³, and their mass, kg. */
  readonly volume: number;
  readonly mass: number;
  readonly layers: number;
  /** volume / flow + layers x change, s; within about 30 %. */
  readonly time: number;
  /** What the time is reckoned from: mm³/s, s a layer, mm a layer. */
  readonly flow: number;
  readonly layerChange: number;
  readonly layer: number;
}

/** A piece on a bed: turned about z by 0 or 90 degrees about its own corner, then its box's lower corner stands at x, y. */
export interface BedItem {
  readonly mark: string;
  readonly piece: string;
  readonly x: number;
  readonly y: number;
  readonly turned: boolean;
  /** Size as it lies before it is turned, mm. */
  readonly box: readonly [number, number, number];
  /** mm³ and kg */
  readonly volume: number;
  readonly mass: number;
  /** Its outline from above in the bed's axes, anticlockwise, mm. */
  readonly outline: readonly Point2[];
}
