import type { Material } from '../../model/material.js';
import type { HubPart, StrutPart } from '../../model/parts.js';
import { sectionProperties } from '../../model/section.js';
import type { Member } from '../../model/truss.js';
import type { Segment } from '../frame/member.js';

/** Poisson's ratio where the material gives neither it nor G: 0.3 for metals, 0.38 for plastics (common practice, no source). */
const POISSON: Partial<Record<Material['family'], number>> = {
  'plastic-print': 0.38,
  acrylic: 0.38,
  'plastic-sheet': 0.38,
};
/** E / G of timber along the grain, as in EN 338. */
const TIMBER_E_TO_G = 16;

/** Shear modulus, MPa. */
function shearModulus(material: Material, modulus: number): number {
  if (material.shearModulus !== undefined) return material.shearModulus;
  if (material.family === 'timber' || material.family === 'glulam') return modulus / TIMBER_E_TO_G;
  return modulus / (2 * (1 + (material.poisson ?? POISSON[material.family] ?? 0.3)));
}

/**
 * Stiffness of a strut per unit length (its `length` is 0): the section's, or what the truss file's area and modulus say of it;
 * a strut of area and modulus alone bends as a solid round bar of that area. null where neither is known.
 */
export function strutStiffness(member: Member, strut: StrutPart): Segment | null {
  const modulus = member.modulus ?? strut.material?.modulus;
  if (modulus === undefined) return null;
  const g = strut.material ? shearModulus(strut.material, modulus) : modulus / 2.6;
  if (strut.section) {
    const p = sectionProperties(strut.section.shape);
    return {
      length: 0,
      axial: modulus * (member.area ?? p.area),
      bendingY: modulus * p.iy,
      bendingZ: modulus * p.iz,
      torsion: g * p.torsion,
    };
  }
  if (member.area === null) return null;
  const second = member.area ** 2 / (4 * Math.PI);
  return {
    length: 0,
    axial: modulus * member.area,
    bendingY: modulus * second,
    bendingZ: modulus * second,
    torsion: 2 * g * second,
  };
}

/**
 * The printed length from a node to the stop of a strut's socket: a solid round bar as thick as the sleeve, of the hub's plastic.
 * null where the hub or the setback is unknown: the strut then runs to the node.
 */
export function zoneStiffness(hub: HubPart | undefined, strut: string): Segment | null {
  const socket = hub?.sockets.find((s) => s.strut === strut);
  if (!hub || !socket || socket.setback === null || !(socket.setback > 0)) return null;
  const bore = typeof socket.bore === 'number' ? socket.bore : Math.min(...socket.bore);
  const d = bore + 2 * socket.wall;
  const e = hub.material.modulus;
  const second = (Math.PI * d ** 4) / 64;
  return {
    length: socket.setback,
    axial: (e * Math.PI * d ** 2) / 4,
    bendingY: e * second,
    bendingZ: e * second,
    torsion: 2 * shearModulus(hub.material, e) * second,
  };
}
