import { standingDeflection } from '../../statics/analyse/standing.js';
import type { AssemblySetting, Link } from './setting.js';

/** Supports that three directions and three turns need at least. */
const LEAST_SUPPORTS = 3;

/**
 * How what stands bears its own weight, on its supports and props; with fewer than three supports under it, on
 * the nodes of the start unit as well, which rest on the bench or are held.
 */
export function standsAs(
  setting: AssemblySetting,
  nodes: readonly number[],
  links: readonly Link[],
  props: readonly number[],
  start: readonly number[],
): number | 'unstable' | null {
  const { truss } = setting.topology;
  const supported = new Set(truss.supports.map((s) => s.node));
  // Fewer than three supports let the whole swing: the start unit is held besides, on the bench or by hand.
  const rests = nodes.filter((n) => supported.has(truss.nodes[n]!.mark)).length >= LEAST_SUPPORTS ? [] : start;
  return standingDeflection(setting.topology, setting.job, setting.parts, {
    nodes,
    struts: links.map((l) => l.strut),
    held: [...new Set([...props, ...rests])],
  });
}
