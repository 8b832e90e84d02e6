import type { StrutPart } from '../../model/parts.js';

/** Lengths of one strut in mm, rounded to 0.001 so that the printed digits add up: axis = setbacks + floats + cut. */
export interface PrintedLengths {
  readonly axis: number;
  readonly setbackFrom: number | null;
  readonly setbackTo: number | null;
  readonly cut: number | null;
  readonly floatFrom: number | null;
  readonly floatTo: number | null;
}

/** Rounds each length by itself and lets the second float, which no hand measures, take up the last digit. */
export function printedLengths(part: StrutPart): PrintedLengths {
  const [from, to] = part.ends;
  const rounded = {
    axis: thousandths(part.axisLength),
    setbackFrom: thousandths(from.setback),
    setbackTo: thousandths(to.setback),
    cut: thousandths(part.cutLength),
    floatFrom: thousandths(from.float),
    floatTo: thousandths(to.float),
  };
  const { axis, setbackFrom, setbackTo, cut, floatFrom, floatTo } = rounded;
  const closing =
    axis !== null &&
    setbackFrom !== null &&
    setbackTo !== null &&
    cut !== null &&
    floatFrom !== null &&
    floatTo !== null
      ? axis - setbackFrom - setbackTo - cut - floatFrom
      : floatTo;
  const mm = (value: number | null): number | null => (value === null ? null : value / 1000);
  return {
    axis: axis! / 1000,
    setbackFrom: mm(setbackFrom),
    setbackTo: mm(setbackTo),
    cut: mm(cut),
    floatFrom: mm(floatFrom),
    floatTo: mm(closing),
  };
}

const thousandths = (mm: number | null): number | null => (mm === null ? null : Math.round(mm * 1000));
