import { entry, num } from './entry.js';

/** Findings on struts: their lengths, sections and ends. */
export const STRUT_FINDINGS = {
  'strut-too-short': entry(
    'stop',
    'strut',
    'mm',
    (f) =>
      `${num(f.value, 1)} mm from node to node, shorter than the ${num(f.limit, 1)} mm that its setbacks and sockets need; move the nodes apart or choose a thinner section`,
  ),
  'section-unknown': entry(
    'stop',
    'strut',
    '',
    (f) =>
      `section "${f.about?.['section']}" is not in the catalogue or the job; name a known one or add it under "sections"`,
  ),
  'strut-not-cut': entry('stop', 'strut', 'mm', () => 'has no cut length because a node at its end could not be made'),
} as const;
