import { IN_PLANE } from '../detailing/systems/clamp-parts.js';
import { LEAST_WALL } from '../detailing/systems/printing.js';
import { dot, negate, normalise, type Vec3, Z_AXIS } from '../maths/vec3.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { HubPart } from '../model/parts.js';
import type { Channel } from './channels.js';
import type { Cradle } from './cradle.js';
import type { Lettering } from './engraving.js';
import type { HubSpace } from './hub-space.js';
import { letteringsFor, type MarkPlace, placeMark, sideTowards, type Taken } from './mark-places.js';

/**
 * What the marks of a hub are tried with until all find room: the largest and the smallest letters as steps of `letteringsFor`, and
 * whether marks crowd: at the mouths first, where sleeves part, and the far nodes' before the hub's own, which is longer but may
 * stand on any sleeve.
 */
const ATTEMPTS = [
  { letters: [0, 4], crowd: false },
  { letters: [2, 4], crowd: false },
  { letters: [3, 5], crowd: false },
  { letters: [4, 5], crowd: true },
] as const;
/** Cosine of the angle that a side marked UP or OUT, or a sleeve marked with an arrow, may be off that direction. */
const TOWARDS = Math.SQRT1_2;

/**
 * Every mark of a hub where it has room: of each sleeve its strut and the strut's far node, of the hub its own with its revision,
 * and which side is up and which out. What finds no room is told.
 */
export function marksOf(
  hub: HubPart,
  job: Job,
  space: HubSpace,
  channels: readonly Channel[],
  cradles: readonly Cradle[],
  findings: Finding[],
): MarkPlace[] {
  let best: Marking | null = null;
  for (const { letters, crowd } of ATTEMPTS) {
    const found = new Marking(hub, job, space, channels, cradles, letters, crowd);
    if (!best || found.missing.length < best.missing.length) best = found;
    if (best.missing.length === 0) break;
  }
  const { missing, places } = best!;
  if (missing.length > 0)
    findings.push(finding('mark-left-out', hub.mark, { value: missing.length, about: { marks: missing.join(', ') } }));
  return places;
}

/** The marks of a hub with letters of some sizes. */
class Marking {
  readonly places: MarkPlace[] = [];
  readonly missing: string[] = [];
  private readonly taken: readonly Taken[][];
  private readonly letterings: readonly (readonly Lettering[])[];
  private readonly outside: readonly Vec3[];

  constructor(
    private readonly hub: HubPart,
    private readonly job: Job,
    private readonly space: HubSpace,
    private readonly channels: readonly Channel[],
    private readonly cradles: readonly Cradle[],
    [from, to]: readonly [number, number],
    private readonly crowd: boolean,
  ) {
    const { sockets, outward } = hub;
    this.taken = sockets.map((_, i) => [...this.openSides(i), ...partingSides(space, i)]);
    const leastWall = LEAST_WALL[job.nodes['process']];
    this.letterings = sockets.map((s) => {
      const all = letteringsFor(job, s.wall, leastWall);
      return all.slice(Math.min(from, Math.max(0, all.length - 1)), to);
    });
    this.outside = sockets.map((s) => sideTowards(s.direction, outward));
    this.placeAll();
  }

  private placeAll(): void {
    const { sockets, mark, revision } = this.hub;
    for (const [i, s] of sockets.entries()) this.want(s.strut, this.on(i, s.strut, s.strut, this.outside[i]!));
    const placeFar = (): void => {
      for (const [i, s] of sockets.entries())
        this.want(`>${s.farNode}`, this.on(i, `>${s.farNode}`, `^${s.farNode}`, negate(this.outside[i]!)));
    };
    if (this.crowd) placeFar();
    // The node's own mark with its revision: on the first sleeve that has room for it, the widest first.
    const own = `${mark}/${revision}`;
    const widest = sockets.map((_, i) => i).sort((a, b) => size(this.space, b) - size(this.space, a) || a - b);
    this.want(
      own,
      widest.some((i) => this.on(i, own, own, negate(this.outside[i]!))),
    );
    if (!this.crowd) placeFar();
    // A foot's plate shows which way is up; a guide lies on the ball from every side.
    if (this.hub.system !== 'foot' && this.hub.system !== 'drilled-ball')
      this.want('UP', this.directed('UP', upOf(this.hub)));
    if (this.hub.system !== 'drilled-ball') this.want('OUT', this.directed('OUT', normalise(this.hub.outward)));
  }

  /** A word on the side that looks in a direction, or with an arrow on a sleeve that runs in it or against it. */
  private directed(word: string, towards: Vec3): boolean {
    const along = this.hub.sockets.map((s) => dot(s.direction, towards));
    const nearest = along.map((_, i) => i).sort((a, b) => Math.abs(along[a]!) - Math.abs(along[b]!) || a - b);
    if (nearest.some((i) => Math.abs(along[i]!) < TOWARDS && this.on(i, word, word, towards, TOWARDS))) return true;
    return nearest.reverse().some((i) => {
      const side = this.outside[i]!;
      if (along[i]! >= TOWARDS) return this.on(i, `>${word}`, `^${word}`, side);
      return along[i]! <= -TOWARDS && this.on(i, `<${word}`, null, side);
    });
  }

  private want(mark: string, placed: boolean): void {
    if (!placed) this.missing.push(mark);
  }

  private on(i: number, along: string, round: string | null, towards: Vec3, least?: number): boolean {
    const found = placeMark(
      this.space,
      i,
      { along, round },
      this.letterings[i]!,
      this.job.nodes.chamfer_mm,
      towards,
      this.taken[i]!,
      this.channels,
      this.cradleOf(i)?.groove?.from,
      least,
      this.crowd,
    );
    if (!found) return false;
    this.places.push(found);
    this.taken[i]!.push(found);
    return true;
  }

  private cradleOf(i: number): Cradle | undefined {
    return this.cradles.find((c) => c.sleeve === i);
  }

  private openSides(i: number): Taken[] {
    const c = this.cradleOf(i);
    return c ? [{ side: c.angle, halfAngle: c.halfAngle, ...WHOLE }] : [];
  }
}

/** Up in the axes that the hub is given in. */
const upOf = (hub: HubPart): Vec3 => (hub.up ? normalise(hub.up) : Z_AXIS);

/** From end to end of a sleeve. */
const WHOLE = { from: Number.NEGATIVE_INFINITY, to: Number.POSITIVE_INFINITY } as const;

/** The two sides of a sleeve that a clamp's parting plane cuts, so that no mark crosses the cut. */
function partingSides(space: HubSpace, i: number): Taken[] {
  const { clamp, sleeves } = space.shape;
  const s = sleeves[i]!.socket;
  if (!clamp || Math.abs(dot(clamp.normal, s.direction)) > IN_PLANE) return [];
  const side = Math.atan2(dot(clamp.normal, s.z), dot(clamp.normal, s.y)) + Math.PI / 2;
  return [side, side + Math.PI].map((at) => ({ side: at, halfAngle: 0.1, ...WHOLE }));
}

function size(space: HubSpace, i: number): number {
  const { outer, mouth, coneTop } = space.sleeves[i]!;
  return (typeof outer === 'number' ? 2 * outer : outer[0] + outer[1]) * (mouth - coneTop);
}
