import type { HubPart, Socket } from '../../model/parts.js';
import { areaOf, type Half, largest, perimeterOf, type Sleeve, sleevesOf, smallest } from './sleeve.js';
import type { SocketStiffness, SocketStrength } from './system.js';

/**
 * Stiffness of each socket, N/mm and N mm/rad, from the plastic's modulus E.
 *
 * Glue passes the strut's force F evenly over the depth d, so the sleeve carries F x/d at x from its mouth and stores
 * F² d / (6 E A): a flexibility of d / (3 E A). The root behind the stop, of length s and the sleeve's full section, adds
 * s / (E A0). Bending and torsion likewise, with second moments for areas and G = E / 2.7 for E (Poisson's ratio 0.35).
 * Derived here from the strain energy (Castigliano); the glue line and the strut itself are taken as stiff.
 */
export function sleeveStiffness(hub: HubPart): SocketStiffness[] {
  const E = hub.material.modulus;
  const G = hub.material.shearModulus ?? E / (2 * (1 + (hub.material.poisson ?? POISSON)));
  return sleevesOf(hub.sockets).map((s) => {
    const { stop, socket } = s;
    const full = momentsOf(s.hollow ? s.outer : s.rootHalf);
    const wall = s.hollow ? minus(full, momentsOf(s.inner)) : momentsOf(s.outer);
    const series = (modulus: number, key: keyof Moments): number =>
      modulus / (stop / full[key] + socket.depth / (3 * wall[key]));
    return {
      strut: socket.strut,
      axial: series(E, 'area'),
      aboutY: series(E, 'iy'),
      aboutZ: series(E, 'iz'),
      torsion: series(G, 'torsion'),
    };
  });
}

/** Poisson's ratio of printed plastics; from memory, 0.33 to 0.40. */
const POISSON = 0.35;
/** Share of strength left across layers where the material gives no value: published tests of filament prints, 50 to 70 %. */
const ACROSS_LAYERS = 0.5;

interface Moments {
  readonly area: number;
  readonly iy: number;
  readonly iz: number;
  readonly torsion: number;
}

function momentsOf(half: Half): Moments {
  if (typeof half === 'number') {
    const second = (Math.PI * half ** 4) / 4;
    return { area: areaOf(half), iy: second, iz: second, torsion: 2 * second };
  }
  // Width along y, height along z: bending about y bends the height.
  const [a, b] = half;
  const iy = (4 * a * b ** 3) / 3;
  const iz = (4 * b * a ** 3) / 3;
  // Saint-Venant's lower estimate for a compact section, A^4 / (40 Ip) (Timoshenko and Goodier, Theory of Elasticity, from memory).
  return { area: areaOf(half), iy, iz, torsion: areaOf(half) ** 4 / (40 * (iy + iz)) };
}

const minus = (a: Moments, b: Moments): Moments => ({
  area: a.area - b.area,
  iy: a.iy - b.iy,
  iz: a.iz - b.iz,
  torsion: a.torsion - b.torsion,
});

/** Section that a side opening as wide as the bore takes from a sleeve: of a ring, the integral of sqrt(R² - u²) over |u| < r, less half the bore. */
function openingArea({ outer, inner }: Sleeve): number {
  if (typeof outer === 'number' && typeof inner === 'number') {
    const under = inner * Math.sqrt(outer ** 2 - inner ** 2) + outer ** 2 * Math.asin(inner / outer);
    return under - (Math.PI * inner ** 2) / 2;
  }
  const [o, i] = [outer as readonly [number, number], inner as readonly [number, number]];
  return 2 * Math.max(i[0] * (o[1] - i[1]), i[1] * (o[0] - i[0]));
}

/**
 * Areas through which each socket passes force.
 *
 * @param ventOf diameter of the hole at a socket's floor, mm; 0: none
 */
export function sleeveStrength(hub: HubPart, ventOf: (socket: Socket) => number): SocketStrength[] {
  const { ft, ftZ } = hub.material.strength;
  const acrossLayers = ft !== undefined && ftZ !== undefined ? ftZ / ft : ACROSS_LAYERS;
  return sleevesOf(hub.sockets).map((s: Sleeve) => {
    const { pin, wall, strut, detail } = s.socket;
    const vent = ventOf(s.socket);
    // What holds the strut when it is in its place.
    const depth = s.socket.depth - (s.socket.travel ?? 0);
    const hole = (Math.PI * pin * pin) / 4;
    if (!s.hollow) {
      // A spigot or plate: its own section carries, glue holds its surface, and the strut stands on the shoulder round it.
      const width = 2 * largest(s.outer);
      return {
        strut,
        wallArea: areaOf(s.outer) - pin * width,
        wall: 2 * smallest(s.outer),
        bondArea: perimeterOf(s.outer) * depth - 2 * hole,
        stopArea: Math.max(0, areaOf(s.rootHalf) - areaOf(s.outer)),
        rootArea: areaOf(s.rootHalf),
        pin: pin > 0 ? { diameter: pin, shearPlanes: 2, bearingArea: pin * width } : null,
        acrossLayers,
      };
    }
    // A cradle is open on a side: half of a round bore, one of four sides, is left to its cap, which is not counted on.
    const open = detail === 'drop-in';
    return {
      strut,
      wallArea: areaOf(s.outer) - areaOf(s.inner) - 2 * pin * wall - (open ? openingArea(s) : 0),
      wall,
      bondArea: perimeterOf(s.inner) * depth * (open ? 0.5 : 1) - 2 * hole - vent * vent,
      stopArea: areaOf(s.inner) - vent * vent,
      rootArea: areaOf(s.outer),
      pin: pin > 0 ? { diameter: pin, shearPlanes: 2, bearingArea: 2 * pin * wall } : null,
      acrossLayers,
    };
  });
}
