import { expect, it } from 'vitest';
import { hubShape } from '../../dist/detailing/systems/hub-shape.js';
import { layOutText } from '../../dist/maths/stroke-text.js';
import { assess } from '../../dist/pipeline/assess.js';
import { loadJob } from '../../dist/pipeline/load.js';
import { canonicalHub } from '../../dist/pipeline/stages/canonical-hub.js';
import { textSize } from '../../dist/shaping/engraving.js';
import { channelsOf } from '../../dist/shaping/hub-channels.js';
import { marksOf } from '../../dist/shaping/hub-marks.js';
import { HubSpace } from '../../dist/shaping/hub-space.js';
import { randomHub } from './random-hub.mjs';

type Hub = ReturnType<typeof randomHub>['hub'];
type Job = ReturnType<typeof randomHub>['job'];

function marked(hub: Hub, job: Job) {
  const findings: { code: string; about?: Record<string, unknown>; value?: number | null }[] = [];
  const space = new HubSpace(hubShape(hub, job));
  const channels = channelsOf(hub, job, space, findings as never);
  const marks = marksOf(hub, job, space, channels, [], findings as never);
  const missing = String(findings.find((f) => f.code === 'mark-left-out')?.about?.['marks'] ?? '');
  return { marks, channels, missing: missing === '' ? [] : missing.split(', ') };
}

/** Points of a mark's box on its sleeve, in the hub's axes. */
function points(hub: Hub, m: ReturnType<typeof marked>['marks'][number]) {
  const { width, height } = textSize(m.text, m.lettering);
  const s = hub.sockets[m.sleeve]!;
  return Array.from({ length: 99 }, (_, k) => {
    const [a, b, along] = m.surface(((k % 11) / 10 - 0.5) * width, (Math.floor(k / 11) / 8 - 0.5) * height, 0);
    return [0, 1, 2].map((c) => s.direction[c]! * along + s.y[c]! * a + s.z[c]! * b);
  });
}

const dot = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, v, k) => sum + v * b[k]!, 0);

it('keeps marks on their sleeves, off holes and off one another, each as its text says', () => {
  for (let seed = 1; seed <= 40; seed++) {
    const { hub, job } = randomHub(seed, { system: 'socket' });
    const { marks, channels, missing } = marked(hub, job);
    const wanted = [
      ...hub.sockets.flatMap((s) => [s.strut, `>${s.farNode}`]),
      `${hub.mark}/${hub.revision}`,
      'UP',
      'OUT',
    ];
    expect(marks.length + missing.length).toBe(wanted.length);
    const clouds = marks.map((m) => points(hub, m));
    marks.forEach((m, i) => {
      const s = hub.sockets[m.sleeve]!;
      if (m.text === s.strut) expect(m.text).toBe(s.strut);
      else
        expect([
          `>${s.farNode}`,
          `^${s.farNode}`,
          `${hub.mark}/${hub.revision}`,
          'UP',
          '>UP',
          '^UP',
          '<UP',
          'OUT',
          '>OUT',
          '^OUT',
          '<OUT',
        ]).toContain(m.text);
      for (const p of clouds[i]!) {
        const along = dot(p, s.direction);
        expect(along).toBeGreaterThan(s.setback!);
        expect(along).toBeLessThan(s.setback! + s.depth - job.nodes.chamfer_mm);
        for (const c of channels) {
          const away = p.map((v, k) => v - c.from[k]!);
          const t = dot(away, c.direction);
          if (t < 0 || t > c.length) continue;
          expect(Math.hypot(...away.map((v, k) => v - t * c.direction[k]!))).toBeGreaterThan(c.radius);
        }
      }
      for (let j = 0; j < i; j++) {
        if (marks[j]!.sleeve !== m.sleeve) continue;
        const least = Math.min(
          ...clouds[i]!.flatMap((p) => clouds[j]!.map((q) => Math.hypot(p[0]! - q[0]!, p[1]! - q[1]!, p[2]! - q[2]!))),
        );
        expect(least).toBeGreaterThan(
          typeof s.bore === 'number' && m.from < marks[j]!.to && marks[j]!.from < m.to ? 1 : 0.15,
        );
      }
    });
  }
});

it('marks the side that is up and the side that is out, or the way there by an arrow, in whatever axes the hub is given', () => {
  let [seen, arrows] = [0, 0];
  for (let seed = 1; seed <= 30; seed++) {
    const made = randomHub(seed, { system: 'socket', count: 3 + (seed % 4), least: 35 });
    const { input } = canonicalHub(made.hub, made.job, []);
    for (const [hub, up] of [
      [made.hub, [0, 0, 1]],
      [input.hub, input.hub.up!],
    ] as const) {
      for (const m of marked(hub as Hub, made.job).marks) {
        const word = m.text.replace(/^[<>^]/, '');
        if (word !== 'UP' && word !== 'OUT') continue;
        seen++;
        const want = word === 'UP' ? up : hub.outward;
        const towards = want.map((v) => v / Math.hypot(...want));
        const s = hub.sockets[m.sleeve]!;
        const middle = m.surface(0, 0, 0);
        const at = [0, 1, 2].map((k) => s.y[k]! * middle[0] + s.z[k]! * middle[1]);
        const side = at.map((v) => v / Math.hypot(...at));
        if (m.text === word) expect(dot(side, towards)).toBeGreaterThan(0.6);
        else {
          arrows++;
          // The arrow comes first: > runs with the text, ^ up its letters, < against it.
          const [right, top] = [m.surface(0.1, 0, 0)[2] - middle[2], m.surface(0, 0.1, 0)[2] - middle[2]];
          const sense = m.text[0] === '>' ? right : m.text[0] === '^' ? top : -right;
          expect(Math.abs(sense)).toBeCloseTo(0.1, 9);
          expect(Math.sign(sense) * dot(s.direction, towards)).toBeGreaterThan(0.7);
        }
      }
    }
  }
  expect(seen).toBeGreaterThan(80);
  expect(arrows).toBeGreaterThan(0);
});

it('draws the arrows that the marks begin with', () => {
  for (const arrow of ['<', '>', '^']) expect(layOutText(arrow).width).toBeGreaterThan(0.2);
});

it('finds room for all but one of the 440 marks of the lantern', async () => {
  const read = await loadJob('examples/lantern');
  if (!('loaded' in read)) throw new Error(read.faults.join('\n'));
  const { parts, job } = assess(read.loaded.truss, read.loaded.job);
  let [placed, left] = [0, 0];
  for (const hub of parts.hubs) {
    const { input } = canonicalHub(hub, job, []);
    const { marks, missing } = marked(input.hub as Hub, input.job as Job);
    placed += marks.length;
    left += missing.length;
  }
  expect(placed + left).toBe(440);
  expect(left).toBeLessThanOrEqual(1);
});
