import type { Sag } from '../../statics/analyse/standing.js';
import type { AssemblySetting, Link } from './setting.js';

/** Supports that three directions and three turns need at least. */
const LEAST_SUPPORTS = 3;

/**
 * How what stands bears its own weight, on its supports and props. With fewer than three supports under it, or on supports
 * that do not hold it by themselves yet, it rests on the nodes of the start unit as well, on the bench or held by hand;
 * `alone`: not on those, where it has three supports.
 */
export function standsAs(
  setting: AssemblySetting,
  nodes: readonly number[],
  links: readonly Link[],
  props: readonly number[],
  start: readonly number[],
  alone = false,
): Sag | 'unstable' | null {
  const struts = links.map((l) => l.strut);
  const on = (held: readonly number[]): Sag | 'unstable' | null =>
    setting.deflection({ nodes, struts, held: [...new Set(held)] });
  const { truss } = setting.topology;
  const supported = new Set(truss.supports.map((s) => s.node));
  if (nodes.filter((n) => supported.has(truss.nodes[n]!.mark)).length < LEAST_SUPPORTS) return on([...props, ...start]);
  const stands = on(props);
  return stands === 'unstable' && !alone ? on([...props, ...start]) : stands;
}
