import { negate, normalise, subtract } from '../../maths/vec3.js';
import type { StrutEntry } from '../../model/assembly.js';
import type { AssemblySetting, Link } from './setting.js';
import { spread } from './spread.js';

/**
 * How the struts between a loose hub and the hubs that stand get in. Struts with a closing detail always do; of the others
 * as many as can be spread together: while the worst needs more than its limit, it is left to be closed.
 */
export function entriesOf(setting: AssemblySetting, hub: number, links: readonly Link[]): readonly StrutEntry[] {
  let known = found.get(setting);
  if (!known) found.set(setting, (known = new Map()));
  const key = `${hub}:${links.map((l) => l.strut).join()}`;
  let entries = known.get(key);
  if (!entries) known.set(key, (entries = findEntries(setting, hub, links)));
  return entries;
}

/** Orders tried one after another come to the same hubs with the same struts. */
const found = new WeakMap<AssemblySetting, Map<string, readonly StrutEntry[]>>();

function findEntries(setting: AssemblySetting, hub: number, links: readonly Link[]): readonly StrutEntry[] {
  const mark = (link: Link): string => setting.topology.truss.members[link.strut]!.mark;
  const detailed = links.filter((l) => l.detail);
  const entries: StrutEntry[] = detailed.map((l) => ({
    strut: mark(l),
    entry: 'detail',
    strain: null,
    detail: { node: setting.topology.truss.members[l.strut]!.ends[l.detail!.end], kind: l.detail!.kind },
  }));
  let plain = links.filter((l) => !l.detail);
  while (plain.length > 0) {
    const result = spread(
      plain.map((l) => ({ direction: towards(setting, hub, l), travel: l.travel, aside: l.aside })),
    );
    if (result.ratio <= 1) {
      plain.forEach((l, i) => {
        const bent = result.each[i]! * setting.job.assembly.springStrain;
        entries.push({
          strut: mark(l),
          entry: plain.length === 1 ? 'loose' : 'spread',
          strain: plain.length === 1 ? null : bent,
          detail: null,
        });
      });
      break;
    }
    const worst = worstOf(plain, result.each);
    entries.push({ strut: mark(plain[worst]!), entry: 'blocked', strain: null, detail: null });
    plain = plain.filter((_, i) => i !== worst);
  }
  const order = new Map(links.map((l, i) => [mark(l), i]));
  return entries.sort((a, b) => order.get(a.strut)! - order.get(b.strut)!);
}

const towards = (setting: AssemblySetting, hub: number, link: Link) => {
  const { nodes } = setting.topology.truss;
  const direction = normalise(subtract(nodes[link.ends[1]]!.at, nodes[link.ends[0]]!.at));
  return link.ends[0] === hub ? direction : negate(direction);
};

/** The strut that most hinders; where several cannot enter at all, the stiffest. */
function worstOf(links: readonly Link[], each: readonly number[]): number {
  let worst = 0;
  for (let i = 1; i < links.length; i++) {
    const more = each[i]! > each[worst]!;
    const stiffer = each[i]! === each[worst]! && links[i]!.aside < links[worst]!.aside;
    if (more || stiffer) worst = i;
  }
  return worst;
}
