import { describe, expect, it } from 'vitest';
import { MATERIALS } from '../../../src/model/catalogue/materials/index.js';
import { SECTIONS } from '../../../src/model/catalogue/sections/index.js';
import { sectionProperties } from '../../../src/model/section.js';

describe('materials', () => {
  it('every one has a source with a mark, a density and a modulus', () => {
    for (const m of MATERIALS.values()) {
      expect(m.source.text.length, m.name).toBeGreaterThan(5);
      expect(m.density, m.name).toBeGreaterThan(0);
      expect(m.modulus, m.name).toBeGreaterThan(0);
      for (const value of Object.values(m.strength)) expect(value, m.name).toBeGreaterThan(0);
    }
  });

  it('a value whose source differs names a field or a strength that the material has', () => {
    for (const m of MATERIALS.values())
      for (const value of Object.keys(m.sources ?? {}))
        expect(value in m || value in m.strength, `${m.name} ${value}`).toBe(true);
  });

  it('EN 338: the relations of EN 384 hold in every row, so that a slip of a digit shows', () => {
    // EN 384:2016 / EN 338:2016 (from memory): ft,0,k between 0.5 and 0.7 fm,k; E0,05 = 0.67 E (C), 0.84 E (D); G = E / 16; E90 = E / 30 (C), E / 15 (D).
    for (const m of MATERIALS.values()) {
      if (!/^[CD]\d\d$/.test(m.name)) continue;
      const soft = m.name.startsWith('C');
      const ratio = m.strength['ft0k']! / m.strength['fmk']!;
      expect(ratio, m.name).toBeGreaterThan(0.5);
      expect(ratio, m.name).toBeLessThan(0.7);
      expect(m.modulus05! / m.modulus, m.name).toBeCloseTo(soft ? 0.67 : 0.84, 1);
      expect(m.modulus / m.shearModulus!, m.name).toBeGreaterThan(15);
      expect(m.modulus / m.shearModulus!, m.name).toBeLessThan(17);
      expect(m.modulus / m.modulus90!, m.name).toBeCloseTo(soft ? 30 : 15, -0.5);
    }
  });

  it('shop dowels and printed plastics are unverified', () => {
    const doubtful = [...MATERIALS.values()].filter((m) => m.name.endsWith('-dowel') || m.family === 'plastic-print');
    expect(doubtful.length).toBeGreaterThan(10);
    for (const m of doubtful) expect(m.source.verified, m.name).toBe(false);
  });
});

describe('sections', () => {
  it('every one has a known material and an area', () => {
    for (const s of SECTIONS.values()) {
      expect(MATERIALS.has(s.material), s.name).toBe(true);
      expect(sectionProperties(s.shape).area, s.name).toBeGreaterThan(0);
    }
  });

  it('names are in the trade’s words', () => {
    for (const name of ['beech-8', 'birch-3/8in', 'birch-1in', 'C24-45x95', 'DFL-2x4', 'CHS-42.4x2.6', 'alu-25x2'])
      expect(SECTIONS.has(name), name).toBe(true);
    expect(SECTIONS.get('birch-3/8in')!.shape).toEqual({ kind: 'round', diameter: 9.525 });
  });

  it('a 42.4 x 2.6 tube has A = 325.1 mm², I = 64645 mm⁴', () => {
    // Computed independently with numpy; product tables of EN 10210-2 print 3.25 cm² and 6.46 cm⁴ (from memory).
    const { area, iy } = sectionProperties(SECTIONS.get('CHS-42.4x2.6')!.shape);
    expect(area).toBeCloseTo(325.092007793472, 8);
    expect(iy).toBeCloseTo(64644.54574973188, 6);
  });
});
