import type { ComparedPart, Comparison, Difference } from '../../model/comparison.js';
import type { Job } from '../../model/job/index.js';
import { PART_KINDS, type PartKind } from '../../model/part-kind.js';
import type { Truss } from '../../model/truss.js';
import { CAUTION } from '../cautions.js';
import { writeFitted } from '../kit/fit-text.js';
import { Flow } from '../kit/flow.js';
import type { Fonts } from '../kit/fonts.js';
import { INK, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Clouded, drawRevisionClouds } from '../kit/revision-cloud.js';
import { type Camera, FRONT, ISOMETRIC, PLAN } from '../kit/view/camera.js';
import { drawTrussView, fillFactor, type ViewStrut } from '../kit/view/truss-view.js';
import { byMark } from '../member-rows.js';

/** What the sheets are drawn from: the trusses of both packs where they hold them. */
export interface ComparisonSource {
  readonly comparison: Comparison;
  /** Title block and paper of the newer pack. */
  readonly job: Job;
  readonly before: Truss | null;
  readonly after: Truss | null;
}

const GROUPS = [
  ['changed', 'Changed'],
  ['new', 'New'],
  ['relabelled', 'Relabelled only'],
  ['withdrawn', 'Withdrawn'],
  ['unchanged', 'Unchanged'],
] as const;
/** How far a cloud keeps from what it goes round, mm. */
const CLEAR = { strut: 2.6, node: 4.6, panel: 2.6 } as const;

/** comparison.pdf: counts, the truss with clouds round what must be made, and every part that is not unchanged. */
export async function comparisonPdf(source: ComparisonSource, fonts: Fonts): Promise<Written> {
  const { comparison: c, job } = source;
  const paper = new Paper({ job, fonts, hold: [], notMade: [] }, 'Revision', CAUTION, 'mm, mm², °');
  paper.addSheet({
    title: `Revision ${c.from.revision} to ${c.to.revision}`,
    instruction: `${c.from.title}, revision ${c.from.revision}, against ${c.to.title}, revision ${c.to.revision}. Make again what is changed or new; take away what is withdrawn.`,
  });
  const flow = new Flow(paper);
  counts(flow, c);
  lists(flow, c);
  if (source.after) for (const camera of [ISOMETRIC, PLAN, FRONT]) picture(paper, camera, source.after, source);
  return paper.finish();
}

function counts(flow: Flow, c: Comparison): void {
  const kinds = PART_KINDS.filter((kind) => GROUPS.some(([group]) => c.totals[group]![kind] > 0));
  flow.heading('How many');
  flow.table(
    [
      { head: '', value: ([, words]) => words, bold: true },
      ...kinds.map((kind) => ({
        head: `${kind}s`,
        align: 'right' as const,
        value: ([group]: (typeof GROUPS)[number]) => String(c.totals[group]![kind]),
      })),
    ],
    [...GROUPS],
  );
}

interface Row extends ComparedPart {
  readonly state: string;
  readonly what: string;
}

function lists(flow: Flow, c: Comparison): void {
  const plain =
    (state: string) =>
    (p: ComparedPart): Row => ({ ...p, state, what: '' });
  const rows: Row[] = [
    ...c.changed.map((p): Row => ({ ...p, state: 'Changed', what: sayDifferences(p.what) })),
    ...c.new.map(plain('New')),
    ...c.relabelled.map(
      (p): Row => ({ ...p, state: 'Relabelled only', what: p.was === p.mark ? 'other marks on it' : `was ${p.was}` }),
    ),
    ...c.withdrawn.map(plain('Withdrawn')),
  ];
  if (rows.length === 0) {
    flow.paragraph('Every part is unchanged.', { bold: true });
    return;
  }
  const place = (kind: PartKind): number => PART_KINDS.indexOf(kind);
  const states = rows.map((r) => r.state);
  rows.sort(
    (a, b) =>
      states.indexOf(a.state) - states.indexOf(b.state) || place(a.kind) - place(b.kind) || byMark(a.mark, b.mark),
  );
  flow.heading('Which parts');
  flow.table(
    [
      { head: 'done', tick: true },
      { head: 'mark', value: (r) => r.mark, bold: true },
      { head: 'part', value: (r) => r.kind },
      { head: 'what, and from what to what', value: (r) => r.what, wraps: true },
    ],
    rows,
    { group: (r) => r.state },
  );
}

/** Differences that a row names; the rest are counted. */
const NAMED = 5;

function sayDifferences(what: readonly Difference[]): string {
  if (what.length === 0) return 'material, process or marks';
  const side = (v: Difference['from']): string =>
    v === null ? 'none' : typeof v === 'number' ? String(Math.round(v * 1000) / 1000) : v;
  const told = what.slice(0, NAMED).map((d) => `${nameOf(d.name)} ${side(d.from)} to ${side(d.to)}`);
  return `${told.join('; ')}${what.length > NAMED ? `; and ${what.length - NAMED} more` : ''}`;
}

/** A measure's name in words: its unit stands in the title block. */
const nameOf = (name: string): string => name.replace(/_(mm2|mm|deg)\b/, '').replaceAll('_', ' ');

function picture(paper: Paper, camera: Camera, after: Truss, { comparison: c, before }: ComparisonSource): void {
  const index = new Map(after.nodes.map((n, i) => [n.mark, i]));
  const again = new Set([...c.changed, ...c.new].map((p) => `${p.kind} ${p.mark}`));
  const isAgain = (kind: PartKind, mark: string): boolean => again.has(`${kind} ${mark}`);
  const nodes = after.nodes.map((n) => ({
    mark: n.mark,
    at: n.at,
    show: isAgain('node', n.mark) ? ('mark' as const) : ('none' as const),
  }));
  const struts = after.members.map((m): ViewStrut => {
    const strong = isAgain('strut', m.mark);
    return {
      mark: m.mark,
      from: index.get(m.ends[0])!,
      to: index.get(m.ends[1])!,
      stroke: strong ? { kind: 'plain', width: 0.7 } : { kind: 'none' },
      label: strong ? { bold: m.mark, plain: '' } : null,
    };
  });
  const area = paper.addSheet({
    title: camera.name,
    instruction: `Clouds go round what is changed or new in revision ${c.to.revision}; black struts are to be cut again, nodes with a mark printed again, panels with a mark cut again. Not to scale.`,
    orientation: paper.orientationFor((room) => fillFactor(nodes, camera, room)),
  });
  const panels = after.faces.filter((f) => isAgain('panel', f.mark));
  const at = (mark: string) => after.nodes[index.get(mark)!]!.at;
  const drawn = drawTrussView(
    paper.pen,
    { ...area, height: area.height - 6 },
    {
      camera,
      nodes,
      struts,
      spots: panels.map((f) => ({ mark: { bold: f.mark, plain: '' }, at: middle(f.nodes.map(at)) })),
      scale: 'fill',
      edge: 14,
    },
  );
  const clouds: Clouded[] = [
    ...after.members
      .filter((m) => isAgain('strut', m.mark))
      .map((m) => ({ points: m.ends.map((e) => drawn.onSheet(at(e))), clear: CLEAR.strut })),
    ...after.nodes
      .filter((n) => isAgain('node', n.mark))
      .map((n) => ({ points: [drawn.onSheet(n.at)], clear: CLEAR.node })),
    ...panels.map((f) => ({ points: [...f.nodes, f.nodes[0]!].map((n) => drawn.onSheet(at(n))), clear: CLEAR.panel })),
  ];
  drawRevisionClouds(paper.pen, clouds);
  const gone = c.withdrawn.map((p) => `${p.kind} ${p.mark}`);
  const note = [
    ...(gone.length > 0 && before ? [`Withdrawn: ${gone.join(', ')}.`] : []),
    ...(drawn.unplaced.length > 0 ? [`No room here, see the list: ${drawn.unplaced.join(', ')}.`] : []),
  ].join(' ');
  if (note !== '')
    writeFitted(
      paper.pen,
      note,
      area.x,
      area.y + area.height - 1.5,
      area.width,
      { size: SIZE.body, colour: INK.black },
      SIZE.note,
    );
}

function middle(points: readonly (readonly [number, number, number])[]): [number, number, number] {
  const sum: [number, number, number] = [0, 0, 0];
  for (const p of points) for (const k of [0, 1, 2] as const) sum[k] += p[k] / points.length;
  return sum;
}
