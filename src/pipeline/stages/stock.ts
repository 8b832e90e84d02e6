import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { StrutPart } from '../../model/parts.js';
import type { PlannedBar, SectionPlan, StockPlan } from '../../model/plan.js';
import type { Section } from '../../model/section.js';
import { planStock } from '../../planning/stock/plan-stock.js';
import type { StockKind, StockPiece } from '../../planning/stock/request.js';

/** Bars that dowels are sold in: common practice, no source. */
const THIN_BAR_MM = 1000;
const BAR_MM = 2000;
const THIN_MM = 12;

const NO_CLOCK = (): number => 0;

export interface PlannedBars {
  readonly plan: StockPlan;
  readonly findings: readonly Finding[];
}

/** Cuts every strut that has a length from the job's bars, each section for itself, offcuts in the rack first. */
export function planBars(struts: readonly StrutPart[], job: Job): Promise<PlannedBars> {
  const groups = [...bySection(struts)].map(
    ([section, members]): PieceGroup => ({
      section,
      pieces: members.map((s) => ({ mark: s.mark, length: s.cutLength!, quantity: 1 })),
      usual: usualBar(members[0]!.section!),
    }),
  );
  return planGroups(groups, job);
}

/** Pieces of one section; `usual` is the length of bar in mm that is sawn where the job names none. */
export interface PieceGroup {
  readonly section: string;
  readonly pieces: readonly StockPiece[];
  readonly usual: number;
}

/** Cuts pieces from the job's bars, group by group. */
export async function planGroups(groups: readonly PieceGroup[], job: Job): Promise<PlannedBars> {
  const findings: Finding[] = [];
  const bars: PlannedBar[] = [];
  const sections: SectionPlan[] = [];
  for (const { section: name, pieces, usual } of groups) {
    const kinds = kindsFor(name, usual, job);
    const answer = await planStock(
      {
        pieces,
        stock: kinds,
        kerf: job.saw.kerf_mm,
        endTrim: job.saw.endTrim_mm,
        trimmedEnds: job.saw.trimEnds,
        offcuts: { least: job.stock.leastOffcut_mm, share: job.stock.offcutValue },
        seed: job.seed,
      },
      NO_CLOCK,
    );
    for (const piece of answer.uncut) {
      const code = piece.reason === 'too-long' ? 'strut-longer-than-stock' : 'stock-runs-out';
      findings.push(finding(code, piece.mark, { value: piece.length, limit: piece.longest, about: { section: name } }));
    }
    const kindOf = new Map(kinds.map((k) => [k.name, k]));
    for (const bar of answer.bars) {
      const kind = kindOf.get(bar.stock)!;
      bars.push({
        mark: `B${String(bars.length + 1).padStart(3, '0')}`,
        section: name,
        stock: bar.stock,
        length: kind.length,
        price: kind.price ?? 1,
        fromRack: kind.rack,
        cuts: bar.cuts,
        offcut: bar.offcut,
        kept: bar.offcut >= job.stock.leastOffcut_mm,
      });
    }
    sections.push({
      section: name,
      bars: answer.bars.length,
      cost: answer.cost,
      lowerBound: answer.lowerBound,
      proven: answer.proven,
    });
  }
  const sum = (of: (s: SectionPlan) => number): number => sections.reduce((total, s) => total + of(s), 0);
  return {
    plan: {
      bars,
      cost: sum((s) => s.cost),
      lowerBound: sum((s) => s.lowerBound),
      proven: sections.every((s) => s.proven),
      sections,
    },
    findings,
  };
}

function bySection(struts: readonly StrutPart[]): ReadonlyMap<string, StrutPart[]> {
  const groups = new Map<string, StrutPart[]>();
  for (const strut of struts) {
    if (strut.cutLength === null || !strut.section) continue;
    const group = groups.get(strut.section.name) ?? [];
    group.push(strut);
    groups.set(strut.section.name, group);
  }
  return groups;
}

interface BarKind extends StockKind {
  readonly rack: boolean;
}

/** Rack offcuts cost nothing and have sawn ends; bars are the job's, or one common length. */
function kindsFor(name: string, usual: number, job: Job): readonly BarKind[] {
  const rack = job.stock.rack
    .filter((r) => r.section === name)
    .map(
      (r, i): BarKind => ({
        name: r.mark ?? `rack ${i + 1}`,
        length: r.length_mm,
        price: 0,
        available: 1,
        trimmedEnds: 0,
        rack: true,
      }),
    );
  const bought = job.stock.bars
    .filter((b) => b.section === name)
    .map(
      (b): BarKind => ({
        name: b.name ?? `${name} x ${b.length_mm}`,
        length: b.length_mm,
        price: b.price,
        available: b.available,
        rack: false,
      }),
    );
  if (bought.length > 0) return [...rack, ...bought];
  return [...rack, { name: `${name} x ${usual}`, length: usual, price: 1, rack: false }];
}

/** Length of the bars that a section is sold in, mm. */
export function usualBar({ shape }: Section): number {
  const thick = shape.kind === 'rectangle' ? Math.max(shape.width, shape.height) : shape.diameter;
  return thick <= THIN_MM ? THIN_BAR_MM : BAR_MM;
}
