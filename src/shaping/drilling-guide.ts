import { ballRadius } from '../detailing/systems/drilled-ball.js';
import { grow, type Sleeve, sleevesOf } from '../detailing/systems/sleeve.js';
import { cross, dot, length, normalise, scale, type Vec3 } from '../maths/vec3.js';
import type { HubPart, Socket } from '../model/parts.js';
import type { HubSpace } from './hub-space.js';
import type { Bench, Manifold } from './kernel.js';
import { sidesFor } from './placed.js';

/** Shell over ball, shell's thickness, bushing's length from the ball, play of the drill in it, gap at the parting, mm. */
const [PLAY, SHELL, BUSHING, DRILL_PLAY, PARTING] = [0.2, 3, 12, 0.15, 0.3] as const;
const BUSHING_WALL = 2.5;

/** The bushings of a ball's drilling guide as sockets: from just inside the ball's surface outwards. */
export function bushings(hub: HubPart): Socket[] {
  const radius = ballRadius(hub);
  return hub.sockets.map((s) => ({
    ...s,
    setback: radius - 2,
    depth: BUSHING + 2,
    bore: (s.bore as number) + DRILL_PLAY,
    wall: BUSHING_WALL,
    pin: 0,
    detail: 'plain' as const,
  }));
}

/** A bushing as a sleeve by itself; it is marked where it stands out of the shell. */
export const bushingSleeves = (socket: Socket, hub: HubPart): Sleeve[] =>
  sleevesOf([socket]).map((s) => ({ ...s, coneTop: ballRadius(hub) + PLAY + SHELL }));

/**
 * The guide: a shell round the ball with a bushing over each bore, in two halves that are tied round the ball. The parting plane is
 * the one that stays farthest from the bushings.
 *
 * @param marked the bushings as made, with their marks, relative to the ball's middle
 */
export function guideHalves(bench: Bench, space: HubSpace, hub: HubPart, marked: Manifold): [Manifold, Manifold] {
  const { Manifold } = bench.kernel;
  const inside = ballRadius(hub) + PLAY;
  const sides = sidesFor(inside + SHELL);
  const ball = bench.hold(Manifold.sphere(inside / Math.cos(Math.PI / sides), sides), 'ball');
  const outer = bench.hold(Manifold.sphere(inside + SHELL, sides), 'shell');
  const paths = space.sleeves.map((s) => {
    const path = bench.hold(Manifold.cylinder(BUSHING + inside, grow(s.inner, 0.02) as number, undefined, 32), 'bore');
    const { y, z, direction: d } = s.socket;
    const placed = bench.hold(
      path.transform([y[0], y[1], y[2], 0, z[0], z[1], z[2], 0, d[0], d[1], d[2], 0, 0, 0, 0, 1]),
      'bore',
    );
    bench.free(path);
    return placed;
  });
  const bored = bench.hold(Manifold.difference([outer, ...paths]), 'shell');
  const whole = bench.hold(Manifold.union([bored, marked]), 'guide');
  const hollow = bench.hold(Manifold.difference([whole, ball]), 'guide');
  const n = partingNormal(space.sleeves.map((s) => s.socket.direction));
  const upper = bench.hold(hollow.trimByPlane([n[0], n[1], n[2]], PARTING / 2), 'half');
  const lower = bench.hold(hollow.trimByPlane([-n[0], -n[1], -n[2]], PARTING / 2), 'half');
  for (const solid of [ball, outer, ...paths, bored, whole, hollow]) bench.free(solid);
  return [upper, lower];
}

/** The unit vector whose plane is farthest, by the sine, from every direction; among the directions' own means and differences and a grid. */
export function partingNormal(directions: readonly Vec3[]): Vec3 {
  const candidates: Vec3[] = [[0, 0, 1]];
  for (let i = 0; i < 12; i++)
    for (let j = 0; j < 24; j++) {
      const [p, a] = [(Math.PI * (i + 0.5)) / 24, (2 * Math.PI * j) / 24];
      candidates.push([Math.sin(p) * Math.cos(a), Math.sin(p) * Math.sin(a), Math.cos(p)]);
    }
  directions.forEach((a, i) => {
    candidates.push(a);
    for (const b of directions.slice(i + 1)) {
      for (const c of [cross(a, b), [a[0] + b[0], a[1] + b[1], a[2] + b[2]] as Vec3])
        if (length(c) > 0.1) candidates.push(normalise(c));
    }
  });
  let best: Vec3 = [0, 0, 1];
  let most = -1;
  for (const n of candidates) {
    const least = Math.min(...directions.map((d) => Math.abs(dot(d, n))));
    if (least > most + 1e-9) {
      most = least;
      best = scale(n, 1);
    }
  }
  return best;
}
