import { nearest } from '../maths/nearest.js';
import type { Finding, SubjectKind } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { Truss } from '../model/truss.js';

/** Findings on every node, strut, face and group that the job names and the truss does not have: a slip of the pen, or a job of another truss. */
export function nameFindings(truss: Truss, job: Job): Finding[] {
  const marks = {
    node: new Set(truss.nodes.map((n) => n.mark)),
    strut: new Set(truss.members.map((m) => m.mark)),
    face: new Set(truss.faces.map((f) => f.mark)),
    'group of struts': new Set(truss.members.flatMap((m) => m.group ?? [])),
    'group of faces': new Set(truss.faces.flatMap((f) => f.group ?? [])),
  };
  type What = keyof typeof marks;
  const kinds: Readonly<Record<What, SubjectKind>> = {
    node: 'node',
    strut: 'strut',
    face: 'face',
    'group of struts': 'strut',
    'group of faces': 'face',
  };
  const found: Finding[] = [];
  const ask = (what: What, key: string, names: Iterable<string>): void => {
    for (const name of names) {
      if (marks[what].has(name)) continue;
      const near = nearest(name, marks[what]);
      found.push(finding('name-unknown', name, { kind: kinds[what], about: { key, what, ...(near ? { near } : {}) } }));
    }
  };
  ask('node', 'nodes.systems', Object.keys(job.nodes.systems));
  ask('node', 'assembly.start', job.assembly.start === undefined ? [] : [job.assembly.start]);
  ask(
    'strut',
    'forces.fix',
    job.forces.fix.map((f) => f.strut),
  );
  ask('strut', 'analysis.selfStress', job.analysis.selfStress ? [job.analysis.selfStress.strut] : []);
  ask('face', 'panels.faces', Object.keys(job.panels.faces));
  ask('group of struts', 'struts.groups', Object.keys(job.struts.groups));
  ask('group of struts', 'forces.pattern', Object.keys(job.forces.pattern));
  ask('group of faces', 'panels.groups', Object.keys(job.panels.groups));
  for (const end of Object.keys(job.struts.ends)) {
    const [strut = '', node = ''] = end.split('@');
    ask('strut', 'struts.ends', [strut]);
    ask('node', 'struts.ends', [node]);
  }
  job.loads.cases.forEach((loadCase, i) => {
    const key = `loads.cases[${i}]`;
    ask(
      'node',
      key,
      loadCase.nodes.map((n) => n.node),
    );
    ask(
      'strut',
      key,
      loadCase.misfit.map((m) => m.strut),
    );
    ask('group of faces', key, loadCase.groups ?? []);
  });
  return found;
}
