import type { StockFault, StockRequest } from './request.js';

/** Longest bar or piece, mm: a kilometre, which whole steps in 32 bits hold with room to spare. */
const MOST_MM = 1e6;
/** Most pieces in all: each becomes a cut in the answer. */
const MOST_PIECES = 1e6;

/** What in a request cannot be used, all of it at once. An empty list: the request can be planned. */
export function requestFaults(request: StockRequest): StockFault[] {
  const faults: StockFault[] = [];
  const say = (place: string, wrong: string, mend: string): void => {
    faults.push({ place, wrong, mend });
  };
  const number = (v: unknown): v is number => typeof v === 'number' && Number.isFinite(v);
  const count = (v: unknown): boolean => Number.isSafeInteger(v) && (v as number) >= 0;
  if (!(number(request.kerf) && request.kerf >= 0 && request.kerf <= MOST_MM))
    say('kerf', `is ${request.kerf}`, 'give a width in mm, 0 or more');
  if (request.endTrim !== undefined && !(number(request.endTrim) && request.endTrim >= 0 && request.endTrim <= MOST_MM))
    say('endTrim', `is ${request.endTrim}`, 'give a length in mm, 0 or more, or leave it out');
  const length = (v: unknown): boolean => number(v) && v > 0 && v <= MOST_MM;
  const many = request.pieces.reduce((sum, p) => sum + (count(p.quantity) ? p.quantity : 0), 0);
  if (many > MOST_PIECES) say('pieces', `are ${many} in all`, `give at most ${MOST_PIECES} at a time`);
  if (request.stock.length === 0) say('stock', 'is empty', 'give at least one kind of bar');
  const ends = (v: unknown): boolean => v === undefined || v === 0 || v === 1 || v === 2;
  if (!ends(request.trimmedEnds)) say('trimmedEnds', `is ${request.trimmedEnds}`, 'give 0, 1 or 2, or leave it out');
  if (request.seed !== undefined && !Number.isSafeInteger(request.seed))
    say('seed', `is ${request.seed}`, 'give a whole number, or leave it out');
  if (request.effort !== undefined && !(number(request.effort) && request.effort > 0))
    say('effort', `is ${request.effort}`, 'give a number above 0, or leave it out');
  if (request.timeLimitMs !== undefined && !(number(request.timeLimitMs) && request.timeLimitMs >= 0))
    say('timeLimitMs', `is ${request.timeLimitMs}`, 'give milliseconds, 0 or more, or leave it out');
  const { offcuts } = request;
  if (offcuts && !(number(offcuts.least) && offcuts.least >= 0))
    say('offcuts', `has least ${offcuts.least}`, 'give a length in mm, 0 or more');
  if (offcuts && !(number(offcuts.share) && offcuts.share >= 0 && offcuts.share <= 1))
    say('offcuts', `has share ${offcuts.share}`, 'give a number from 0 to 1');
  request.stock.forEach((s, i) => {
    const place = `stock[${i}] ${s.name}`;
    if (!length(s.length)) say(place, `has length ${s.length}`, `give a length in mm above 0 and up to ${MOST_MM}`);
    if (s.price !== undefined && !(number(s.price) && s.price >= 0))
      say(place, `has price ${s.price}`, 'give a price, 0 or more, or leave it out for 1');
    if (s.available !== undefined && !count(s.available))
      say(place, `has available ${s.available}`, 'give a whole number, 0 or more, or leave it out');
    if (!ends(s.trimmedEnds)) say(place, `has trimmedEnds ${s.trimmedEnds}`, 'give 0, 1 or 2, or leave it out');
  });
  request.pieces.forEach((p, i) => {
    const place = `pieces[${i}] ${p.mark}`;
    if (!length(p.length)) say(place, `has length ${p.length}`, `give a length in mm above 0 and up to ${MOST_MM}`);
    if (!count(p.quantity)) say(place, `has quantity ${p.quantity}`, 'give a whole number, 0 or more');
  });
  return faults;
}
