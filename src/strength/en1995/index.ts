import { resistanceOf } from '../resistance.js';
import { governing, lacking, type Standard } from '../standard.js';
import { compressionChecks, lateralChecks, type Stresses, tensionChecks } from './combined.js';
import { designStrengths } from './design.js';
import { shearChecks } from './shear.js';

/**
 * EN 1995-1-1:2004 with A1:2008 and A2:2014, solid timber and glulam, round and rectangular: 6.1.2 to 6.1.8, 6.2.3, 6.2.4, 6.3.2, 6.3.3.
 * The grain runs along the strut.
 */
export const EN_1995: Standard = {
  name: 'EN 1995-1-1',
  missing: (material) => [
    ...lacking(material, ['fmk', 'ft0k', 'fc0k', 'fvk']),
    ...(material.modulus05 === undefined ? ['E0.05'] : []),
  ],
  outOfScope: () => null,
  judge(member, actions, rules) {
    const r = resistanceOf(member.shape);
    const f = designStrengths(member, actions.duration, rules);
    const stresses: Stresses = {
      axial: actions.axial / r.area,
      my: Math.abs(actions.momentY) / r.wy,
      mz: Math.abs(actions.momentZ) / r.wz,
    };
    return governing([
      ...(actions.axial < 0 ? compressionChecks(member, r, stresses, f) : tensionChecks(r, stresses, f)),
      ...lateralChecks(member, r, stresses, f),
      ...shearChecks(member, r, actions, f),
    ]);
  },
};
