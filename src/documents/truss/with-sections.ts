import { findNodeAtLocation, type Node, parseTree } from 'jsonc-parser';

/**
 * The text of a truss file with a section on every member, everything else as it was: comments, order, spacing.
 *
 * @param text a truss file without faults; @param sections by member index, in the file's order
 */
export function withSections(text: string, sections: readonly string[]): string {
  const root = parseTree(text);
  const members = (root && findNodeAtLocation(root, ['members'])?.children) ?? [];
  let out = '';
  let done = 0;
  members.forEach((member, i) => {
    const section = sections[i];
    if (section === undefined) return;
    const { at, length, text: put } = edit(member, section);
    out += text.slice(done, at) + put;
    done = at + length;
  });
  return out + text.slice(done);
}

/** Replaces the value of `section`, or adds the key behind the last one. */
function edit(member: Node, section: string): { readonly at: number; readonly length: number; readonly text: string } {
  const value = JSON.stringify(section);
  const old = findNodeAtLocation(member, ['section']);
  if (old) return { at: old.offset, length: old.length, text: value };
  const last = member.children![member.children!.length - 1]!;
  return { at: last.offset + last.length, length: 0, text: `, "section": ${value}` };
}
