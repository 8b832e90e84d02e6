import { describe, expect, it } from 'vitest';
import type { Material } from '../../../src/model/material.js';
import { strutStiffness, zoneStiffness } from '../../../src/statics/analyse/member-stiffness.js';
import { trussOf } from '../../helpers/truss.js';
import { inputOf, jobWith } from './input.js';

const truss = trussOf({
  nodes: [
    [0, 0, 400],
    [300, 0, 0],
    [-150, 260, 0],
    [-150, -260, 0],
  ],
  edges: [
    [0, 1],
    [0, 2],
    [0, 3],
  ],
  supports: [1, 2, 3].map((n) => [n, 'xyz'] as const),
});
const parts = (change: object) => inputOf(truss, jobWith(change as never)).parts;

describe('a strut', () => {
  const [strut] = parts({ struts: { section: 'beech-8' } }).struts;
  const made = (material: Partial<Material>) =>
    strutStiffness(truss.members[0], { ...strut, material: { ...strut.material!, ...material } })!;
  const polar = (Math.PI * 8 ** 4) / 32;

  it('of timber that gives no G twists by E / 16, the ratio of every class of EN 338', () => {
    for (const family of ['timber', 'glulam'] as const)
      expect(made({ family, modulus: 12800, shearModulus: undefined }).torsion).toBeCloseTo(800 * polar, 6);
    expect(made({ modulus: 12800, shearModulus: 690 }).torsion).toBeCloseTo(690 * polar, 6);
  });

  it('of metal or plastic by E / (2 (1 + nu)): 0.3 and 0.38 where the material does not say (common practice, no source)', () => {
    const g = (material: Partial<Material>) => made({ modulus: 10000, shearModulus: undefined, ...material }).torsion;
    const family = 'steel';
    expect(g({ family, poisson: undefined }) / polar).toBeCloseTo(10000 / 2.6, 9);
    expect(g({ family, poisson: 0.25 }) / polar).toBeCloseTo(4000, 9);
    for (const plastic of ['plastic-print', 'acrylic', 'plastic-sheet'] as const)
      expect(g({ family: plastic, poisson: undefined }) / polar).toBeCloseTo(10000 / 2.76, 9);
  });

  it('of area and modulus alone bends as a round bar of that area: E A² / 4 pi, twists by twice that over 2.6', () => {
    const bare = { ...truss.members[0], area: 50, modulus: 1000 };
    const s = strutStiffness(bare, { ...strut, section: null, material: null })!;
    const d = Math.sqrt((4 * 50) / Math.PI);
    expect(s.axial).toBeCloseTo(50000, 9);
    expect(s.bendingY).toBeCloseTo((1000 * Math.PI * d ** 4) / 64, 6);
    expect(s.bendingZ).toBe(s.bendingY);
    expect(s.torsion).toBeCloseTo(((1000 / 2.6) * Math.PI * d ** 4) / 32, 6);
    expect(strutStiffness({ ...bare, area: null }, { ...strut, section: null, material: null })).toBeNull();
  });

  it('keeps its section in bending where the file gives it another area and modulus', () => {
    const s = strutStiffness({ ...truss.members[0], area: 70, modulus: 900 }, strut)!;
    expect(s.axial).toBeCloseTo(63000, 9);
    expect(s.bendingY).toBeCloseTo((900 * Math.PI * 8 ** 4) / 64, 6);
  });
});

describe('the printed zone of a socket', () => {
  const hub = parts({}).hubs[0];
  const zone = (bore: number | readonly [number, number]) => {
    const sockets = hub.sockets.map((s) => ({ ...s, setback: 30, bore, wall: 3 }));
    return zoneStiffness({ ...hub, material: { ...hub.material, modulus: 2000 }, sockets } as typeof hub, 'S0')!;
  };

  it('is a round bar of the bore and two walls in the plastic: pi d² / 4, pi d⁴ / 64, pi d⁴ / 32 (d = 8.4 + 6)', () => {
    const z = zone(8.4);
    expect(z.length).toBe(30);
    expect(z.axial).toBeCloseTo((2000 * Math.PI * 14.4 ** 2) / 4, 6);
    expect(z.bendingY).toBeCloseTo((2000 * Math.PI * 14.4 ** 4) / 64, 5);
    expect(z.bendingZ).toBe(z.bendingY);
    const g = hub.material.shearModulus ?? 2000 / (2 * (1 + (hub.material.poisson ?? 0.38)));
    expect(z.torsion).toBeCloseTo((g * Math.PI * 14.4 ** 4) / 32, 4);
  });

  it('round a rectangle counts by its lesser side', () => {
    expect(zone([45.5, 22.4]).bendingY).toBeCloseTo((2000 * Math.PI * 28.4 ** 4) / 64, 3);
  });

  it('is none without a hub, a socket or a setback', () => {
    expect(zoneStiffness(undefined, 'S0')).toBeNull();
    expect(zoneStiffness(hub, 'S9')).toBeNull();
    const unknown = { ...hub, sockets: hub.sockets.map((s) => ({ ...s, setback: null })) };
    expect(zoneStiffness(unknown, 'S0')).toBeNull();
  });
});
