import { standingDeflection } from '../../statics/analyse/standing.js';
import type { AssemblySetting, Link } from './setting.js';

/**
 * How what stands bears its own weight, on its supports and props; without a support under it, on the three or more
 * nodes of the start unit that lie lowest, which rest on the bench.
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
  const rests = nodes.some((n) => supported.has(truss.nodes[n]!.mark)) ? [] : start;
  return standingDeflection(setting.topology, setting.job, setting.parts, {
    nodes,
    struts: links.map((l) => l.strut),
    held: [...new Set([...props, ...rests])],
  });
}
