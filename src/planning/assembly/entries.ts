import { negate, normalise, subtract } from '../../maths/vec3.js';
import type { StrutEntry } from '../../model/assembly.js';
import { hubFouls, strutFouls } from './fouls.js';
import type { AssemblySetting, Link } from './setting.js';
import { type Spread, spread } from './spread.js';

/**
 * How the struts between a loose hub and the hubs that stand get in. Struts with a closing detail always do; of the others
 * as many as can be spread together: while the worst needs more than its limit, or one runs into a hub or a strut on its way, it
 * is left to be closed. `stands`: the struts that stand already, by index.
 */
export function entriesOf(
  setting: AssemblySetting,
  hub: number,
  links: readonly Link[],
  stands: (strut: number) => boolean,
): readonly StrutEntry[] {
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
    const result = spreadOf(setting, hub, plain);
    let worst = result.ratio <= 1 ? -1 : worstOf(plain, result.each);
    let by: string | null = null;
    if (worst < 0) {
      by = hubFouls(setting, hub, result.move, stands);
      if (by !== null) worst = worstOf(plain, result.each);
      for (let i = 0; i < plain.length && worst < 0; i++) {
        by = strutFouls(setting, hub, plain[i]!, result.move, stands);
        if (by !== null) worst = i;
      }
    }
    if (worst < 0) {
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
    entries.push({
      strut: mark(plain[worst]!),
      entry: 'blocked',
      strain: null,
      detail: null,
      ...(by === null ? {} : { hits: by }),
    });
    plain = plain.filter((_, i) => i !== worst);
  }
  const order = new Map(links.map((l, i) => [mark(l), i]));
  return entries.sort((a, b) => order.get(a.strut)! - order.get(b.strut)!);
}

/** Orders tried one after another come to the same hubs with the same struts. */
const known = new WeakMap<AssemblySetting, Map<string, Spread>>();

function spreadOf(setting: AssemblySetting, hub: number, links: readonly Link[]): Spread {
  let here = known.get(setting);
  if (!here) {
    here = new Map();
    known.set(setting, here);
  }
  const key = `${hub}:${links.map((l) => l.strut).join()}`;
  let result = here.get(key);
  if (!result) {
    result = spread(links.map((l) => ({ direction: towards(setting, hub, l), travel: l.travel, aside: l.aside })));
    here.set(key, result);
  }
  return result;
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
