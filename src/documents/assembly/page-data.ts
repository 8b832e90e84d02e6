import { sayFinding } from '../../model/findings/index.js';
import { sectionProperties } from '../../model/section.js';
import { CAUTION } from '../cautions.js';
import { sayInUnits } from '../kit/say-in-units.js';
import { fixed, unitsOf } from '../kit/units.js';
import type { PackRecords } from '../records.js';
import type { PageData } from './page/data.js';
import { howItEnters, sayStep, stepNotes } from './step-words.js';

/** Everything that the page shows, in the papers' units. `key` sets ticks of one content apart from another's. */
export function pageData(records: PackRecords, key: string): PageData {
  const { topology, parts, job, assembly, forces, utilisations } = records;
  const { truss } = topology;
  let largest = 0;
  for (const f of forces?.values ?? []) largest = Math.max(largest, Math.abs(f));
  const units = unitsOf(job, largest);
  const hubs = new Map(parts.hubs.map((h) => [h.mark, h]));
  const worst = new Map<string, number>();
  for (const u of utilisations)
    if (u.kind === 'strut') worst.set(u.mark, Math.max(worst.get(u.mark) ?? 0, u.utilisation));
  const propped = new Set<number>();
  const node = (mark: string): number => topology.nodeIndex.get(mark)!;
  const sheetOf = new Map(
    (records.nesting?.sheets ?? []).flatMap((s) => s.placements.map((p) => [p.mark, s.mark] as const)),
  );
  const panelIndex = new Map(parts.panels.map((p, i) => [p.mark, i]));
  return {
    title: job.title,
    revision: job.revision,
    date: job.date,
    key,
    caution: CAUTION,
    hold: records.hold.map((words) => sayInUnits(words, records.job.output)),
    nodes: truss.nodes.map((n) => {
      const hub = hubs.get(n.mark);
      const thick = Math.max(
        3,
        ...(hub?.sockets ?? []).map((s) => sectionProperties(s.section.shape).circumradius + s.wall),
      );
      return {
        mark: n.mark,
        at: n.at,
        radius: thick * 1.25,
        sockets: hub?.sockets.length ?? 0,
        files: records.made.get(n.mark)?.files ?? [],
      };
    }),
    struts: parts.struts.map((s, i) => {
      const f = forces?.values[i] ?? null;
      const used = worst.get(s.mark);
      return {
        mark: s.mark,
        ends: topology.truss.members[i]!.ends.map(node) as [number, number],
        section: s.section?.name ?? 'unknown',
        radius: s.section ? sectionProperties(s.section.shape).circumradius : 3,
        cut: s.cutLength === null ? 'no length' : `${units.cut(s.cutLength)} ${units.lengthUnit}`,
        force: f,
        forceText: f === null ? '' : `${units.force(f)} ${units.forceUnit} ${units.sense(f)}`.trim(),
        utilisation: used === undefined ? '' : fixed(used, 2),
        files: s.cutLength === null ? [] : ['struts/cut-list.pdf', 'struts/saw-plan.pdf', 'struts/labels.pdf'],
      };
    }),
    panels: parts.panels.map((p) => ({
      mark: p.mark,
      corners: p.outline.map(
        ([u, v]) =>
          [0, 1, 2].map((k) => p.frame.origin[k]! + u * p.frame.x[k]! + v * p.frame.y[k]!) as [number, number, number],
      ),
      words: `${p.material?.title ?? 'panel'}, ${units.length(p.thickness)} ${units.lengthUnit}${sheetOf.has(p.mark) ? `, from ${sheetOf.get(p.mark)}` : ''}`,
      files: sheetOf.has(p.mark) ? [`panels/sheets/${sheetOf.get(p.mark)}.svg`] : [],
    })),
    steps: (assembly?.steps ?? []).map((step) => {
      for (const n of step.release) propped.delete(node(n));
      for (const n of step.props) propped.add(node(n));
      return {
        say: sayStep(step),
        nodes: step.hubs.map(node),
        struts: step.struts.map((e) => ({ index: topology.memberIndex.get(e.strut)!, how: howItEnters(e) })),
        panels: step.panels.map((p) => panelIndex.get(p)!),
        props: step.props.map(node),
        propped: [...propped],
        notes: stepNotes(step, units),
      };
    }),
    findings: records.findings.map((f) => ({
      level: f.level,
      subject: f.subject,
      message: sayInUnits(sayFinding(f), records.job.output),
    })),
  };
}
