import type { StrutPart } from '../model/parts.js';
import type { MemberActions, Utilisation } from '../model/solution.js';
import type { Member } from '../model/truss.js';
import type { Assessment, PackRecords } from './records.js';

/** One strut with all that the lists say of it. Unknown is null. */
export interface MemberRow {
  readonly member: Member;
  readonly part: StrutPart;
  /** N, tension positive. */
  readonly force: number | null;
  /** Its own worst utilisation, sockets apart. */
  readonly worst: Utilisation | null;
  /** Mark of the stock bar it is cut from. */
  readonly bar: string | null;
  /** Least and largest axial force over all combinations, N. */
  readonly envelope: { readonly least: number; readonly most: number } | null;
}

/** What the rows are made of: plans may be missing. */
export type RowRecords = Assessment & Partial<Pick<PackRecords, 'stock'>>;

/** The struts in the truss's order. */
export function memberRows(records: RowRecords): MemberRow[] {
  const worst = worstByStrut(records.utilisations);
  const bars = barsByStrut(records);
  return records.topology.truss.members.map((member, i) => ({
    member,
    part: records.parts.struts[i]!,
    force: records.forces?.values[i] ?? null,
    worst: worst.get(member.mark) ?? null,
    bar: bars.get(member.mark) ?? null,
    envelope: envelopeOf(records.solution?.actions[i] ?? []),
  }));
}

/** The largest utilisation of each strut itself, sockets apart. */
export function worstByStrut(utilisations: readonly Utilisation[]): Map<string, Utilisation> {
  const worst = new Map<string, Utilisation>();
  for (const u of utilisations)
    if (u.kind === 'strut' && u.utilisation > (worst.get(u.mark)?.utilisation ?? Number.NEGATIVE_INFINITY))
      worst.set(u.mark, u);
  return worst;
}

function barsByStrut(records: RowRecords): Map<string, string> {
  return new Map((records.stock?.bars ?? []).flatMap((bar) => bar.cuts.map((cut) => [cut.mark, bar.mark] as const)));
}

function envelopeOf(actions: readonly MemberActions[]): MemberRow['envelope'] {
  if (actions.length === 0) return null;
  const axial = actions.map((a) => a.axial);
  return { least: Math.min(...axial), most: Math.max(...axial) };
}

/** The largest force in N that the papers print. */
export function largestForce(records: Assessment): number {
  let largest = 0;
  for (const force of records.forces?.values ?? []) largest = Math.max(largest, Math.abs(force));
  for (const actions of records.solution?.actions ?? [])
    for (const { axial } of actions) largest = Math.max(largest, Math.abs(axial));
  return largest;
}

/** Marks in the order in which people count: S2 before S10. */
export function byMark(a: string, b: string): number {
  const [pa, pb] = [a.match(PARTS) ?? [], b.match(PARTS) ?? []];
  for (let i = 0; i < Math.min(pa.length, pb.length); i++) {
    const [x, y] = [pa[i]!, pb[i]!];
    const numbers = DIGIT.test(x) && DIGIT.test(y);
    if (numbers && Number(x) !== Number(y)) return Number(x) - Number(y);
    if (x !== y) return x < y ? -1 : 1;
  }
  return pa.length - pb.length;
}

const PARTS = /\d+|\D+/g;
const DIGIT = /^\d/;
