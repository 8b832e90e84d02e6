import { findNodeAtLocation, type Node, parseTree } from 'jsonc-parser';
import type { Truss } from '../../model/truss.js';
import { LENGTH_IN_MM, type LengthUnit } from '../../model/units.js';

/**
 * The text of a truss file with the nodes, member forces and force diagram of a mended truss, everything else as it was: comments, order,
 * spacing, and every number that did not change.
 *
 * @param text a truss file without faults; @param before and @param after the truss in mm and N, with lengths `scale` and forces
 * `forceScale` times those of the file
 */
export function withMending(text: string, before: Truss, after: Truss, scale: number, forceScale: number): string {
  const root = parseTree(text);
  if (!root) return text;
  const unit = LENGTH_IN_MM[findNodeAtLocation(root, ['units'])?.value as LengthUnit] * scale;
  const list = (path: string[]): readonly Node[] => findNodeAtLocation(root, path)?.children ?? [];
  const point = (at: readonly number[]): string => `[${at.map((v) => v / unit).join(', ')}]`;
  const same = (a: readonly number[], b: readonly number[]): boolean => a.every((v, k) => v === b[k]);

  const edits: { readonly at: number; readonly length: number; readonly text: string }[] = [];
  const put = (node: Node | undefined, value: string): void => {
    if (node) edits.push({ at: node.offset, length: node.length, text: value });
  };
  list(['nodes']).forEach((node, i) => {
    if (!same(before.nodes[i]!.at, after.nodes[i]!.at))
      put(findNodeAtLocation(node, ['at']), point(after.nodes[i]!.at));
  });
  list(['members']).forEach((member, i) => {
    const force = after.members[i]!.force;
    if (force !== null && force !== before.members[i]!.force) {
      put(findNodeAtLocation(member, ['force']), String(force / forceScale));
    }
  });
  list(['reciprocal', 'vertices']).forEach((vertex, i) => {
    const [was, is] = [before.reciprocal?.vertices[i], after.reciprocal?.vertices[i]];
    if (was && is && !same(was.at, is.at)) put(findNodeAtLocation(vertex, ['at']), point(is.at));
  });

  let out = '';
  let done = 0;
  for (const edit of edits.sort((a, b) => a.at - b.at)) {
    out += text.slice(done, edit.at) + edit.text;
    done = edit.at + edit.length;
  }
  return out + text.slice(done);
}
