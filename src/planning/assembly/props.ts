import type { Sag } from '../../statics/analyse/standing.js';
import { isHeld } from './search.js';
import type { AssemblySetting, Link } from './setting.js';
import { standsAs } from './stands.js';

/** Props of one step, by node index, and how all stands with them. */
export interface Propped {
  readonly props: readonly number[];
  readonly release: readonly number[];
  readonly stands: Sag | 'unstable' | null;
}

/** Most props that one step adds against sagging: each is set where it then sags most. */
const PROPS_A_STEP = 4;
/** Whether props may go is asked after this many steps without an answer of yes: the weight of one hub seldom decides it. */
const ASK_EVERY = 8;

/**
 * Keeps count of the props under what is being built. A hub that its struts do not hold by themselves is propped until they
 * do. What is held by its sockets can still swing or sag with all that stands: then its hubs are propped as well, until the
 * whole stands without those props.
 */
export class Propper {
  /** Under hubs that nothing holds yet. */
  private readonly propped = new Set<number>();
  /** Under what would swing or sag. */
  private readonly steadied = new Set<number>();
  private readonly limit: number;
  private unasked = 0;

  constructor(
    private readonly setting: AssemblySetting,
    private readonly start: readonly number[],
  ) {
    const { links, job } = setting;
    const mean = links.reduce((sum, l) => sum + l.length, 0) / Math.max(links.length, 1);
    this.limit = job.assembly.sag * mean;
  }

  /** After the hubs have been added to what stands (both with them); `last`: nothing is added after them. */
  after(hubs: readonly number[], nodes: readonly number[], standing: readonly Link[], last: boolean): Propped {
    const { setting, propped, steadied } = this;
    const held = this.heldBy(standing);
    const props = hubs.filter((n) => !held(n) && !isSupport(setting, n));
    let release = [...propped].filter(held);
    for (const n of release) propped.delete(n);
    for (const n of props) propped.add(n);
    const standsOn = (on: Iterable<number>, alone = false): Propped['stands'] =>
      standsAs(setting, nodes, standing, [...on], this.start, alone);

    let stands = standsOn([...propped, ...steadied]);
    if (stands === 'unstable' && release.length > 0) {
      // Each is held by struts whose other ends nothing holds: the props stay until all stands by itself.
      for (const n of release) steadied.add(n);
      release = [];
      stands = standsOn([...propped, ...steadied]);
    }
    const add = (more: readonly number[]): void => {
      for (const n of more) steadied.add(n);
      props.push(...more);
      stands = standsOn([...propped, ...steadied]);
    };
    if (stands === 'unstable') {
      const more = hubs.filter((n) => !propped.has(n) && !steadied.has(n));
      if (more.length > 0) add(more);
    }
    for (let k = 0; k < PROPS_A_STEP && this.sags(stands); k++) {
      const { node } = stands as Sag;
      if (propped.has(node) || steadied.has(node) || isSupport(setting, node)) break;
      add([node]);
    }
    this.unasked += 1;
    const ask = last || this.unasked >= ASK_EVERY || hubs.some((n) => isSupport(setting, n));
    if (last || (ask && steadied.size > 0 && props.length === 0)) {
      this.unasked = 0;
      // In the end nothing may be left under it.
      const without = last ? standsOn([], true) : standsOn(propped);
      if (last || (without !== 'unstable' && !this.sags(without))) {
        stands = without;
        if (without !== 'unstable') {
          release.push(...(last ? propped : []), ...steadied);
          steadied.clear();
        }
      }
    }
    return { props, release, stands };
  }

  private sags(stands: Propped['stands']): boolean {
    return stands !== null && stands !== 'unstable' && stands.most > this.limit;
  }

  private heldBy(standing: readonly Link[]): (node: number) => boolean {
    const stands = new Set(standing);
    return (n) =>
      isHeld(
        this.setting,
        n,
        this.setting.linksAt[n]!.filter((l) => stands.has(l)),
      );
  }
}

const isSupport = (setting: AssemblySetting, node: number): boolean => {
  const { truss } = setting.topology;
  return truss.supports.some((s) => s.node === truss.nodes[node]!.mark && s.fixed.z);
};
