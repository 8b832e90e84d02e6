import { packChecks } from '../../documents/pack-checks.js';
import type { Assessment } from '../../documents/records.js';
import type { Level } from '../../model/finding.js';
import { sayFinding } from '../../model/findings/index.js';
import type { Paint } from './paint.js';

/** How each level is called on the terminal; seven columns, so that subjects stand below each other. */
const LEVEL: Readonly<Record<Level, string>> = { stop: 'STOP', warn: 'warning', note: 'note' };

const plural = (n: number, word: string, many = `${word}s`): string => `${n} ${n === 1 ? word : many}`;

/** The check in sentences, one fact a line, findings last and worst first. */
export function sayAssessment(a: Assessment, paint: Paint): string {
  const { truss } = a.topology;
  const left = packChecks(a.parts).filter((c) => a.notChecked.includes(c));
  const missing = a.notChecked.filter((c) => !left.includes(c));
  const lines = [
    `${paint('bold', a.job.title)}, revision ${a.job.revision}`,
    '',
    `${plural(truss.nodes.length, 'node')}, ${plural(truss.members.length, 'strut')}, ${plural(truss.faces.length, 'face')}, of which ${plural(truss.faces.filter((f) => f.panel).length, 'panel')}.`,
    ...equilibriumLines(a),
    ...flatnessLines(a),
    ...strengthLines(a),
    `Checked: ${a.checked.join(', ') || 'nothing'}.`,
    ...(missing.length > 0 ? [`Not checked: ${missing.join(', ')}.`] : []),
    ...(left.length > 0 ? [`Not checked until the pack is made: ${left.join(', ')}.`] : []),
    '',
    ...a.findings.map(
      (f) =>
        `${paint(f.level === 'stop' ? 'orange' : f.level === 'warn' ? 'purple' : 'grey', LEVEL[f.level].padEnd(8))} ${sayFinding(f)}`,
    ),
    ...a.waived.map((f) => `${'waived'.padEnd(8)} ${sayFinding(f)} (${f.about?.['reason']}, ${f.about?.['by']})`),
    ...(a.findings.length + a.waived.length > 0 ? [''] : []),
    verdict(a),
  ];
  return `${lines.join('\n')}\n`;
}

function equilibriumLines(a: Assessment): string[] {
  if (!a.equilibrium) return [];
  const { maxResidual, maxRelative } = a.equilibrium;
  return [
    `Largest residual at a node: ${maxResidual.toPrecision(2)} N, ${maxRelative.toPrecision(2)} of the largest force there.`,
  ];
}

function flatnessLines(a: Assessment): string[] {
  if (a.forms.length === 0) return [];
  const worst = a.forms.reduce((w, f) => (f.flatness > w.flatness ? f : w));
  return [`Least flat face: ${worst.mark}, ${worst.flatness.toFixed(3)} mm out of plane.`];
}

function strengthLines(a: Assessment): string[] {
  if (a.utilisations.length === 0) return [];
  const worst = a.utilisations.reduce((w, u) => (u.utilisation > w.utilisation ? u : w));
  const where = worst.at ? `${worst.mark} at ${worst.at}` : worst.mark;
  return [`Highest utilisation: ${where}, ${worst.utilisation.toFixed(2)} by ${worst.rule}.`];
}

function verdict(a: Assessment): string {
  const count = (level: Level): number => a.findings.filter((f) => f.level === level).length;
  const counts = [plural(count('stop'), 'stop'), plural(count('warn'), 'warning'), plural(count('note'), 'note')].join(
    ', ',
  );
  if (a.status === 'clear') return `Clear: ${counts}.`;
  return `${a.hold.length > 0 ? 'On hold' : 'Flagged'}: ${counts}.`;
}
