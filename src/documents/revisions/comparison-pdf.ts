import type { ComparedPart, Comparison, Difference } from '../../model/comparison.js';
import type { Job } from '../../model/job/index.js';
import { PART_KINDS, type PartKind } from '../../model/part-kind.js';
import type { Truss } from '../../model/truss.js';
import { LENGTH_IN_MM } from '../../model/units.js';
import { CAUTION } from '../cautions.js';
import { writeFitted } from '../kit/fit-text.js';
import { Flow } from '../kit/flow.js';
import type { Fonts } from '../kit/fonts.js';
import { INK, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Clouded, drawRevisionClouds } from '../kit/revision-cloud.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
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
  const units = unitsOf(job, 0);
  const words = `${units.lengthUnit}, ${units.areaUnit}, °`;
  const paper = new Paper({ job, fonts, hold: [], notMade: [] }, 'Revision', CAUTION, words);
  paper.addSheet({
    title: `Revision ${c.from.revision} to ${c.to.revision}`,
    instruction: `${c.from.title}, revision ${c.from.revision}, against ${c.to.title}, revision ${c.to.revision}. Make again what is changed or new; take away what is withdrawn.`,
  });
  const flow = new Flow(paper);
  counts(flow, c);
  lists(flow, c, job);
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

function lists(flow: Flow, c: Comparison, job: Job): void {
  const plain =
    (state: string) =>
    (p: ComparedPart): Row => ({ ...p, state, what: '' });
  const rows: Row[] = [
    ...c.changed.map((p): Row => ({ ...p, state: 'Changed', what: sayDifferences(p.what, job) })),
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

function sayDifferences(what: readonly Difference[], job: Job): string {
  if (what.length === 0) return 'material, process or marks';
  const told = what.slice(0, NAMED).map((d) => {
    const [from, to] = sides(d, job);
    return `${nameOf(d.name)} ${from} to ${to}`;
  });
  return `${told.join('; ')}${what.length > NAMED ? `; and ${what.length - NAMED} more` : ''}`;
}

/** Both values of a measure in the papers' units; where they would read the same, with the decimals that tell them apart. */
function sides({ name, from, to }: Difference, job: Job): readonly [string, string] {
  const both = (number: (v: number) => string): readonly [string, string] => {
    const say = (v: Difference['from']): string => (v === null ? 'none' : typeof v === 'number' ? number(v) : v);
    return [say(from), say(to)];
  };
  const exact = (v: number): string => String(Math.round(v * 1000) / 1000);
  if (job.output.units === 'SI') return both(exact);
  const units = unitsOf(job, 0);
  const said = both((v) => measure(name, v, units) ?? exact(v));
  return said[0] === said[1] ? both((v) => fineMeasure(name, v) ?? exact(v)) : said;
}

const [LENGTH, AREA] = [/_mm\b/, /_mm2\b/] as const;
/** What a rule or a saw's stop is set to. */
const RULED = /^(cut_length|edge)_mm\b/;

function measure(name: string, v: number, units: Units): string | null {
  if (AREA.test(name)) return units.area(v);
  if (!LENGTH.test(name)) return null;
  return name.startsWith('cut_length') ? units.cut(v) : units.length(v, RULED.test(name) ? 1 : 2);
}

/** A length to 0.00001 in, an area to 0.0001 in²: a comparison tells what differs by 0.0015 mm. */
function fineMeasure(name: string, v: number): string | null {
  if (AREA.test(name)) return fixed(v / LENGTH_IN_MM.in ** 2, 4);
  return LENGTH.test(name) ? fixed(v / LENGTH_IN_MM.in, 5) : null;
}

/** A measure's name in words, parted from its value where it ends in a mark or number: its unit stands in the title block. */
const nameOf = (name: string): string =>
  `${name.replace(/_(mm2|mm|deg)\b/, '').replaceAll('_', ' ')}${name.includes(' ') ? ':' : ''}`;

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
