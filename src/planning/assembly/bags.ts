import type { AssemblyPlan, AssemblyStep, Bag } from '../../model/assembly.js';
import type { PlannedBar } from '../../model/plan.js';
import type { AssemblySetting } from './setting.js';

/** Hubs that go into one bag: what an hour's work uses up. Common practice, no source. */
const HUBS_A_BAG = 5;

/** Bags by step, every part in exactly one: steps in order, a new bag after each five hubs; panels go by themselves. */
export function packBags(steps: readonly AssemblyStep[]): readonly Bag[] {
  const bags: Bag[] = [];
  let open: AssemblyStep[] = [];
  const close = (): void => {
    if (open.length === 0) return;
    bags.push(bagOf(`Bag ${bags.length + 1}`, open));
    open = [];
  };
  for (const step of steps) {
    const panels = step.kind === 'panel';
    if (open.length > 0 && (open[0]!.kind === 'panel') !== panels) close();
    open.push(step);
    if (!panels && open.reduce((sum, s) => sum + s.hubs.length, 0) >= HUBS_A_BAG) close();
  }
  close();
  return bags;
}

function bagOf(name: string, steps: readonly AssemblyStep[]): Bag {
  return {
    name,
    steps: [steps[0]!.number, steps.at(-1)!.number],
    hubs: steps.flatMap((s) => s.hubs),
    struts: steps.flatMap((s) => s.struts.map((e) => e.strut)),
    panels: steps.flatMap((s) => s.panels),
    mass_kg: steps.reduce((sum, s) => sum + s.mass_kg, 0),
  };
}

/** Spare parts: a share of each kind, at least one: bars by what they were bought as, hubs by number of sockets. */
export function sparesOf(setting: AssemblySetting, bars: readonly PlannedBar[]): AssemblyPlan['spares'] {
  const share = setting.job.assembly.spares;
  if (share === 0) return [];
  const count = new Map<string, number>();
  const add = (what: string): void => void count.set(what, (count.get(what) ?? 0) + 1);
  for (const b of bars) if (!b.fromRack) add(`bar ${b.stock}`);
  for (const h of setting.parts.hubs) if (h.makeable) add(`hub of ${h.sockets.length} sockets`);
  return [...count].map(([what, n]) => ({ what, count: Math.max(1, Math.ceil(n * share)) }));
}
