import { describe, expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import type { Material } from '../../src/model/material.js';
import type { Socket } from '../../src/model/parts.js';
import type { SectionShape } from '../../src/model/section.js';
import type { MemberActions } from '../../src/model/solution.js';
import { axialOnly } from '../../src/strength/actions.js';
import type { SocketCase, SocketPath } from '../../src/strength/socket/case.js';
import { glued } from '../../src/strength/socket/glued.js';
import { pinned } from '../../src/strength/socket/pinned.js';
import { seated } from '../../src/strength/socket/seated.js';

/** An invented plastic of round figures, so that each sum can be followed: in plane 40, across layers 20, shear 20, crushing 50 MPa. */
const PLASTIC: Material = {
  ...MATERIALS.get('PETG-print')!,
  strength: { ft: 40, ftZ: 20, fc: 50, fv: 20, fm: 40 },
};
const wood = MATERIALS.get('D40')!;
const tube: SectionShape = { kind: 'tube', diameter: 20, wall: 2 };
const round: SectionShape = { kind: 'round', diameter: 20 };

/** A socket 60 mm deep with a bore of 21 mm and walls of 4 mm round a bar of 20 mm, a pin of 4 mm, 1 mm of float; short load, factor 2. */
function caseOf(
  shape: SectionShape,
  strut: Material,
  actions: Partial<MemberActions>,
  more: Partial<Socket> = {},
  rest: Partial<SocketCase> = {},
): SocketCase {
  return {
    socket: {
      strut: 'S1',
      farNode: 'B',
      direction: [1, 0, 0],
      y: [0, 1, 0],
      z: [0, 0, 1],
      section: { name: 's', shape, material: strut.name, measured: null },
      setback: 20,
      depth: 60,
      bore: 21,
      wall: 4,
      joint: 'pinned',
      detail: 'plain',
      pin: 4,
      ...more,
    },
    strut,
    hub: PLASTIC,
    float: 1,
    passes: null,
    actions: { ...axialOnly('c', 0, 'short'), ...actions },
    rules: { serviceClass: 1, factor: 2 },
    bond: 6,
    ...rest,
  };
}
const use = (path: SocketPath, c: SocketCase, words: string): number => {
  const found = path(c)!.filter((v) => v.rule.includes(words));
  expect(found.length, words).toBeGreaterThan(0);
  return found[0].utilisation;
};

describe('a bar pinned across, in tension, part by part (formulas of any handbook of joints)', () => {
  const N = 1000;
  const pulled = (strut: Material, shape: SectionShape, more: Partial<Socket> = {}) =>
    caseOf(shape, strut, { axial: N }, more);

  it('the pin in double shear 0.6 fu A / 1.25 and bent over F/8 (b + 4c + 2a)', () => {
    // EN 1993-1-8 table 3.10 and figure 3.11: S235 pin, fu 360, fy 235, A = 4 pi, Wel = pi 4³/32; b 20, c 0.5, a 4.
    const shear = N / 2 / ((0.6 * 360 * 4 * Math.PI) / 1.25);
    const bent = ((N / 8) * (20 + 2 + 8)) / (1.5 * (Math.PI * 2) * 235);
    expect(use(pinned, pulled(wood, round), 'pin in shear')).toBeCloseTo(shear, 10);
    expect(use(pinned, pulled(wood, round), 'pin in shear and bending')).toBeCloseTo(shear ** 2 + bent ** 2, 9);
  });
  it('bears on two walls of d t, 50 MPa over 2', () => {
    expect(use(pinned, pulled(wood, round), 'bearing of the pin on the socket walls')).toBeCloseTo(
      N / (2 * 4 * 4 * 25),
      10,
    );
  });
  it('bears on the wood: fh = 0.082 (1 - 0.01 d) rho_k, kmod 0.9, gammaM 1.3', () => {
    // EN 1995-1-1 (8.16) and (8.32), rho_k 550 of D40 (EN 338:2016).
    const fh = 0.082 * 0.96 * 550;
    expect(use(pinned, pulled(wood, round), '8.5.1.1')).toBeCloseTo(N / (4 * 20 * ((0.9 * fh) / 1.3)), 9);
  });
  it('pulls on the net section: pi/4 d² less the hole, ft,0,k 24', () => {
    expect(use(pinned, pulled(wood, round), '5.2')).toBeCloseTo(N / ((100 * Math.PI - 80) * ((0.9 * 24) / 1.3)), 9);
  });
  it('shears a plug out of the wood: two planes of 29 x 20 mm, fv,k 4.2', () => {
    // The end stands 1 mm off the stop: 59 engaged less the 30 of the pin from the mouth leaves 29.
    expect(use(pinned, pulled(wood, round), 'plug shear of the strut')).toBeCloseTo(
      N / (2 * 29 * 20 * ((0.9 * 4.2) / 1.3)),
      9,
    );
  });
  it('shears plugs out of the walls: two planes in each wall, 30 x 4 mm, 20 MPa over 2', () => {
    expect(use(pinned, pulled(wood, round), 'plug shear of the socket walls')).toBeCloseTo(N / (4 * 30 * 4 * 10), 10);
  });
  it('pulls the sleeve across its layers at the pin: pi/4 (29² - 21²) less two holes, 20 MPa over 2', () => {
    const net = (Math.PI / 4) * (29 ** 2 - 21 ** 2) - 2 * 4 * 4;
    expect(use(pinned, pulled(wood, round), 'tension across layers')).toBeCloseTo(N / (net * 10), 9);
  });
  it('a tube of 6060-T6 loses two walls at the pin: 0.9 fu / 1.25 on A - 2 d t; bears by 1.5 t d fo', () => {
    const alloy = MATERIALS.get('6060-T6')!;
    const area = (Math.PI / 4) * (400 - 256) - 2 * 4 * 2;
    expect(use(pinned, pulled(alloy, tube), 'net section')).toBeCloseTo(N / ((area * 0.9 * 170) / 1.25), 9);
    expect(use(pinned, pulled(alloy, tube), 'bearing of the pin on the strut')).toBeCloseTo(N / (1.5 * 4 * 4 * 140), 9);
    // Torn out behind: two planes in each of two walls of 2 mm, 29 mm long, fu / (sqrt3 1.25).
    const torn = 2 * 29 * 4 * (170 / (Math.sqrt(3) * 1.25));
    expect(use(pinned, pulled(alloy, tube), 'shear of the strut behind the pin')).toBeCloseTo(N / torn, 9);
  });
  it('a dowel of 6 mm and more in graded timber keeps 80 mm to the loaded end and 3 d to the edge (8.6, table 8.5)', () => {
    const thick = pulled(wood, round, { pin: 6 });
    expect(use(pinned, thick, '8.6, table 8.5, loaded end')).toBeCloseTo(80 / 29, 10);
    expect(use(pinned, thick, '8.6, table 8.5, edge')).toBeCloseTo(18 / 10, 10);
    expect(pinned(pulled(wood, round))!.some((v) => v.rule.includes('8.6'))).toBe(false);
    expect(pinned(caseOf(round, wood, { axial: -N }, { pin: 6 }))!.some((v) => v.rule.includes('8.6'))).toBe(false);
  });
  it('pressed, it has neither net section nor plugs', () => {
    const rules = pinned(caseOf(round, wood, { axial: -N }))!.map((v) => v.rule);
    expect(rules.some((r) => /plug|net section/.test(r))).toBe(false);
    expect(rules.some((r) => r.includes('compression'))).toBe(true);
  });
});

describe('a glued bar', () => {
  it('by the bond on pi d l, by the wood under it, by the sleeve across layers', () => {
    const c = caseOf(round, wood, { axial: 900 }, { joint: 'glued' });
    const surface = Math.PI * 20 * 59;
    expect(use(glued, c, 'bond in shear')).toBeCloseTo(900 / surface / 3, 10);
    expect(use(glued, c, 'shear of the wood')).toBeCloseTo(900 / surface / ((0.9 * 4.2) / 1.3), 9);
    expect(use(glued, c, 'tension across layers')).toBeCloseTo(900 / ((Math.PI / 4) * (29 ** 2 - 21 ** 2) * 10), 9);
  });
  it('carries a quarter of its short strength where the load stands', () => {
    const c = caseOf(round, wood, { axial: 900, duration: 'permanent' }, { joint: 'glued' });
    expect(use(glued, c, 'bond in shear')).toBeCloseTo(900 / (Math.PI * 20 * 59) / 1.5, 10);
    expect(use(glued, c, 'tension across layers')).toBeCloseTo(900 / ((Math.PI / 4) * (29 ** 2 - 21 ** 2) * 5), 9);
  });
  it('a steel rod in a bored wooden hub: mean pull-out by Feligioni et al. over the factor', () => {
    // d 20, glue line 0.5, 59 mm deep, density of the hub: pi la (fv dequ + 0.086 (d + e) e), fv = 1.2e-3 dequ^-0.2 rho^1.5, dequ = 21.
    const hub = MATERIALS.get('C24')!;
    const c = caseOf(round, MATERIALS.get('S235')!, { axial: 5000 }, { joint: 'glued' }, { hub });
    const fv = 1.2e-3 * 21 ** -0.2 * hub.density ** 1.5;
    const mean = Math.PI * 59 * (fv * 21 + 0.086 * 20.5 * 0.5);
    expect(use(glued, c, 'glued-in rod')).toBeCloseTo((2 * 5000) / mean, 9);
  });
  it('a moment is held by a couple of pressures 6 M / (d l²), and bends the sleeve at its root', () => {
    const M = 4000;
    const c = caseOf(round, wood, { axial: 900, momentY: 0.6 * M, momentZ: 0.8 * M }, { joint: 'glued' });
    const pressure = (6 * M) / (20 * 59 ** 2);
    expect(use(glued, c, 'bearing of the strut on its socket')).toBeCloseTo(pressure / 25, 10);
    // EN 1995-1-1 6.1.5 (6.3) with fc,90,k 5.5 of D40.
    expect(use(glued, c, '6.1.5')).toBeCloseTo(pressure / ((0.9 * 5.5) / 1.3), 9);
    const w = (Math.PI / 32) * ((29 ** 4 - 21 ** 4) / 29);
    const wall = 900 / ((Math.PI / 4) * (29 ** 2 - 21 ** 2) * 10) + M / w / 10;
    expect(use(glued, c, 'tension across layers with bending')).toBeCloseTo(wall, 9);
  });
  it('a square sleeve bends about its weak axis', () => {
    const square: SectionShape = { kind: 'rectangle', width: 20, height: 30 };
    const c = caseOf(square, wood, { axial: 0, momentZ: 5000 }, { joint: 'glued', bore: [21, 31] });
    // Outside 29 x 39, inside 21 x 31: W = (39 x 29³ - 31 x 21³) / (6 x 29).
    const w = (39 * 29 ** 3 - 31 * 21 ** 3) / (6 * 29);
    expect(use(glued, c, 'with bending')).toBeCloseTo(5000 / w / 10, 10);
  });
});

it('a seated bar presses its end on the stop: the weaker of plastic 50/2 and wood 27 x 0.9/1.3', () => {
  const c = caseOf(round, wood, { axial: -3000 }, { joint: 'seated' });
  expect(use(seated, c, 'stop')).toBeCloseTo(3000 / (100 * Math.PI) / ((27 * 0.9) / 1.3), 9);
  expect(seated(caseOf(round, wood, { axial: 1 }))).toBeNull();
});
