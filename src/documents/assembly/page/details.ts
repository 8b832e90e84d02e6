import type { PageData } from './data.js';
import type { PartRef } from './scene.js';

/** An element with a text and a class. */
export const element = (tag: string, text = '', className = ''): HTMLElement => {
  const e = document.createElement(tag);
  e.textContent = text;
  if (className) e.className = className;
  return e;
};

export const markOf = (data: PageData, p: PartRef): string =>
  p.kind === 'node'
    ? data.nodes[p.index]!.mark
    : p.kind === 'strut'
      ? data.struts[p.index]!.mark
      : data.panels[p.index]!.mark;

/** What is known of a picked part: sizes, force, files, findings; `step` counts from 0. */
export function details(data: PageData, part: PartRef, step: number, onClose: () => void): HTMLElement[] {
  const close = element('button', 'Close', 'small');
  close.addEventListener('click', onClose);
  const mark = markOf(data, part);
  const head = element('h2', `${{ node: 'Node', strut: 'Strut', panel: 'Panel' }[part.kind]} ${mark}`);
  const found = data.findings.filter((f) => f.subject === mark).map((f) => f.message);
  const rows: [string, string][] = [
    ['Comes in', `step ${step + 1}`],
    ...FACTS[part.kind](data, part.index),
    ...(found.length > 0 ? [['Found', found.join(' ')] as [string, string]] : []),
  ];
  const list = element('dl');
  for (const [term, text] of rows) if (text) list.append(element('dt', term), element('dd', text));
  return [head, list, close];
}

/** Term and text by kind of part; an empty text is left out. */
const FACTS: Readonly<Record<PartRef['kind'], (data: PageData, index: number) => [string, string][]>> = {
  strut: (data, index) => {
    const s = data.struts[index]!;
    return [
      ['Cut length', s.cut],
      ['Section', s.section],
      ['From, to', s.ends.map((n) => data.nodes[n]!.mark).join(', ')],
      ['Force', s.forceText],
      ['Utilisation', s.utilisation],
      ['Files', s.files.join(', ')],
    ];
  },
  node: (data, index) => {
    const n = data.nodes[index]!;
    return [
      ['Sockets', String(n.sockets)],
      [
        'Struts',
        data.struts
          .filter((s) => s.ends.includes(index))
          .map((s) => s.mark)
          .join(', '),
      ],
      ['Files', n.files.join(', ')],
    ];
  },
  panel: (data, index) => {
    const p = data.panels[index]!;
    return [
      ['Panel', p.words],
      ['Files', p.files.join(', ')],
    ];
  },
};
