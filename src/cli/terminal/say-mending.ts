import { sayFinding } from '../../model/findings/index.js';
import type { Mended } from '../../statics/mend/mend.js';

/** Every node's movement, farthest first, then what it came to; or why mending was refused. */
export function sayMending(mended: Mended): string {
  const moves = [...mended.movements].sort((a, b) => b.distance - a.distance || (a.node < b.node ? -1 : 1));
  const rows = moves.map((m) => [m.node, ...m.by.map((v) => signed(v)), m.distance.toFixed(4)]);
  const head = ['node', 'x mm', 'y mm', 'z mm', 'moves mm'];
  const widths = head.map((h, k) => Math.max(h.length, ...rows.map((r) => r[k]!.length)));
  const line = (cells: readonly string[]): string =>
    cells.map((c, k) => (k === 0 ? c.padEnd(widths[k]!) : c.padStart(widths[k]!))).join('  ');
  const state = (word: string, s: Mended['before']): string =>
    `${word}: faces flat to ${fine(s.flatness)} mm${s.residual === null ? '' : `, nodes in balance to ${fine(s.residual)} N`}.`;
  return [
    ...(rows.length > 0 ? [line(head), ...rows.map(line), ''] : []),
    state('Before', mended.before),
    state(mended.done ? 'After' : 'It would be', mended.after),
    ...(mended.forces ? [`Forces change by ${fine(mended.forceChange)} N at most.`] : []),
    ...(mended.done && rows.length === 0 ? ['Nothing moves: the truss is flat and in balance as it stands.'] : []),
    ...mended.findings.map((f) => `STOP ${sayFinding(f)}`),
    '',
  ].join('\n');
}

/** Four decimals with a true minus sign; what rounds to nought has none. */
const signed = (v: number): string => (v <= -0.00005 ? `−${(-v).toFixed(4)}` : Math.abs(v).toFixed(4));

/** Two digits, as small as they come. */
const fine = (v: number): string => (v === 0 ? '0' : v >= 0.001 ? v.toPrecision(2) : v.toExponential(1));
