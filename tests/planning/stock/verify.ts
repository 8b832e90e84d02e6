import type { StockAnswer, StockRequest } from '../../../src/planning/stock/request.js';

const up = (mm: number): number => Math.ceil(mm * 10 - 1e-5);
const down = (mm: number): number => Math.floor(mm * 10 + 1e-5);

/**
 * Everything that is wrong with a plan, found from the request and the answer alone: demand, kerfs, trim, offcuts,
 * numbers of bars, price and bound. Shares no code with the planner.
 */
export function planFaults(request: StockRequest, answer: StockAnswer): string[] {
  const wrong: string[] = [];
  const wanted = new Map<string, number>();
  const key = (mark: string, length: number): string => `${mark} ${length}`;
  const add = (k: string, n: number): void => {
    wanted.set(k, (wanted.get(k) ?? 0) + n);
  };
  for (const p of request.pieces) if (p.quantity > 0) add(key(p.mark, p.length), p.quantity);
  const kinds = new Map(request.stock.map((s) => [s.name, s]));
  const used = new Map<string, number>();
  let price = 0;
  let credit = 0;
  answer.bars.forEach((bar, i) => {
    const kind = kinds.get(bar.stock);
    if (!kind) {
      wrong.push(`bar ${i}: no stock ${bar.stock}`);
      return;
    }
    used.set(bar.stock, (used.get(bar.stock) ?? 0) + 1);
    price += kind.price ?? 1;
    if (bar.cuts.length === 0) wrong.push(`bar ${i}: nothing cut`);
    let room = down(kind.length) - up(request.endTrim ?? 0) * (kind.trimmedEnds ?? request.trimmedEnds ?? 1);
    bar.cuts.forEach((cut, c) => {
      add(key(cut.mark, cut.length), -1);
      if (c > 0) {
        room -= up(request.kerf);
        if (cut.length > bar.cuts[c - 1]!.length + 0.1) wrong.push(`bar ${i}: cut ${c} is longer than the one before`);
      }
      room -= up(cut.length);
    });
    if (room < 0) wrong.push(`bar ${i}: over-full by ${-room / 10} mm`);
    const offcut = Math.max(0, room - up(request.kerf)) / 10;
    const { least, share } = request.offcuts ?? { least: 0, share: 0 };
    if (offcut >= least) credit += (share * (kind.price ?? 1) * offcut) / kind.length;
    if (Math.abs(offcut - bar.offcut) > 1e-9) wrong.push(`bar ${i}: offcut ${bar.offcut}, should be ${offcut}`);
  });
  for (const u of answer.uncut) add(key(u.mark, u.length), -u.quantity);
  for (const [k, n] of wanted) if (n !== 0) wrong.push(`${k}: ${n > 0 ? `${n} missing` : `${-n} too many`}`);
  for (const [name, n] of used) {
    const available = kinds.get(name)!.available ?? Infinity;
    if (n > available) wrong.push(`${name}: ${n} used, ${available} there`);
  }
  if (Math.abs(credit - answer.credit) > 1e-6 * Math.max(1, price))
    wrong.push(`credit ${answer.credit}, not ${credit}`);
  price -= credit;
  if (Math.abs(price - answer.cost) > 1e-6 * Math.max(1, price)) wrong.push(`cost ${answer.cost}, should be ${price}`);
  if (answer.lowerBound > answer.cost * (1 + 1e-9) + 1e-9) wrong.push(`bound ${answer.lowerBound} > ${answer.cost}`);
  if (answer.proven && Math.abs(answer.lowerBound - answer.cost) > 1e-6) wrong.push('proven, but the bound is lower');
  return wrong;
}

/**
 * Least price by trying everything: pieces in turn, each into every bar that still has room, or a new bar of each kind.
 * A textbook oracle for a dozen pieces; Infinity when the pieces cannot be cut.
 */
export function leastPrice(request: StockRequest): number {
  const kerf = up(request.kerf);
  const lengths: number[] = [];
  for (const p of request.pieces) for (let q = 0; q < p.quantity; q++) lengths.push(up(p.length));
  lengths.sort((a, b) => b - a);
  const rooms = request.stock.map(
    (s) => down(s.length) - up(request.endTrim ?? 0) * (s.trimmedEnds ?? request.trimmedEnds ?? 1) + kerf,
  );
  const left = request.stock.map((s) => s.available ?? Infinity);
  let best = Infinity;
  const { least, share } = request.offcuts ?? { least: 0, share: 0 };
  const open: number[] = [];
  const kindOf: number[] = [];
  const credit = (): number =>
    open.reduce((sum, room, b) => {
      const { price = 1, length } = request.stock[kindOf[b]!]!;
      return room / 10 >= least ? sum + (share * price * room) / 10 / length : sum;
    }, 0);
  const place = (i: number, price: number): void => {
    if ((1 - share) * price >= best) return;
    if (i === lengths.length) {
      best = Math.min(best, price - credit());
      return;
    }
    const need = lengths[i]! + kerf;
    const tried = new Set<string>();
    for (let b = 0; b < open.length; b++) {
      const like = `${kindOf[b]} ${open[b]}`;
      if (open[b]! < need || tried.has(like)) continue;
      tried.add(like);
      open[b]! -= need;
      place(i + 1, price);
      open[b]! += need;
    }
    for (let k = 0; k < rooms.length; k++) {
      if (left[k]! <= 0 || rooms[k]! < need) continue;
      left[k]!--;
      open.push(rooms[k]! - need);
      kindOf.push(k);
      place(i + 1, price + (request.stock[k]!.price ?? 1));
      open.pop();
      kindOf.pop();
      left[k]!++;
    }
  };
  place(0, 0);
  return best;
}
