import type { BucklingResult } from '../../model/solution.js';
import type { Flow } from '../kit/flow.js';
import { sayInUnits } from '../kit/say-in-units.js';
import { fixed, type Units } from '../kit/units.js';
import type { PackRecords } from '../records.js';
import { MECHANISMS_SHOWN } from './pictures/mechanisms.js';

/** What was checked and how it came out, in words; then what was not checked. */
export function checksSection(flow: Flow, records: PackRecords, units: Units): void {
  flow.heading('Checks');
  const { equilibrium, solution, checked, notChecked, forms, job } = records;
  if (equilibrium)
    flow.paragraph(
      `Equilibrium of the case “${equilibrium.case}”: the largest residual at a node is ${sayInUnits(`${plain(equilibrium.maxResidual)} N`, job.output)}, ${plain(equilibrium.maxRelative)} of the largest force there (a warning from ${job.fit.residualWarn}, a stop from ${job.fit.residualStop}).`,
    );
  if (forms.length > 0) {
    const worst = forms.reduce((most, form) => (form.flatness > most.flatness ? form : most));
    flow.paragraph(
      worst.flatness < FLAT
        ? `Flatness of ${forms.length} faces: all are flat to ${units.length(FLAT, 3)} ${units.lengthUnit}.`
        : `Flatness of ${forms.length} faces: the worst is ${worst.mark}, out of flat by ${units.length(worst.flatness, 3)} ${units.lengthUnit}.`,
    );
  }
  reciprocalWords(flow, records);
  const counts = solution?.counts;
  if (counts) {
    flow.paragraph(
      `As a pin-jointed figure on its supports the truss has ${plural(counts.selfStressStates, 'state')} of self-stress, ${plural(counts.mechanisms, 'mechanism')} and ${plural(counts.rigidBody, 'rigid-body freedom')} left.`,
    );
    for (const note of counts.mechanismNotes.slice(0, MECHANISMS_SHOWN)) flow.paragraph(`Mechanism: ${note.words}.`);
    const more = counts.mechanismNotes.length - MECHANISMS_SHOWN;
    if (more > 0) flow.paragraph(`And ${more} more mechanisms of this kind.`);
    if (counts.mechanisms > 0 && counts.loadCompatible !== null)
      flow.paragraph(
        counts.loadCompatible
          ? 'The loads are compatible with the mechanisms: they do no work on them, so the struts alone can balance them.'
          : 'The loads are not compatible with the mechanisms: they drive them, and struts on pins alone cannot balance them.',
      );
  }
  for (const buckling of solution?.buckling ?? []) bucklingWords(flow, buckling);
  flow.paragraph(`Checked: ${checked.length > 0 ? checked.join(', ') : 'nothing'}.`);
  if (notChecked.length > 0) flow.paragraph(`Not checked: ${notChecked.join(', ')}.`, { bold: true });
}

function bucklingWords(flow: Flow, { combination, factors, strut, design, euler }: BucklingResult): void {
  if (factors[0] === undefined) return;
  const designed = design !== undefined && design !== null && design < factors[0];
  const first = strut ? `${strut} bows first` : 'the nodes sway first';
  const own = euler
    ? ` Taken alone, from node to node with pinned ends, ${euler.strut} is nearest to its Euler load: at ${fixed(euler.factor, 2)} times.`
    : '';
  flow.paragraph(
    `Buckling of the whole under ${combination}: lowest load factor ${fixed(factors[0], 2)}${designed ? `, ${fixed(design, 2)} with design stiffness` : ''}; ${first}.${own}`,
  );
}

function reciprocalWords(flow: Flow, { reciprocal, job }: PackRecords): void {
  if (!reciprocal?.counts) return;
  const { dimension, selfStressStates, reached } = reciprocal.counts;
  if (dimension !== null)
    flow.paragraph(
      `Reciprocal figure: ${plural(dimension, 'independent diagram')}${
        selfStressStates === null ? '' : ` beside ${plural(selfStressStates, 'state')} of self-stress`
      }${reached === null ? '' : `, of which the diagrams reach ${reached}`}.`,
    );
  const { residuals } = reciprocal;
  if (residuals)
    flow.paragraph(
      `Of the diagram, the largest angle between a strut and its polygon’s normal is ${plain((residuals.maxAngle * 180) / Math.PI)}°, and the worst node’s polyhedron closes to ${sayInUnits(`${plain(residuals.maxClosure)} N`, job.output)}.`,
    );
}

const plural = (n: number, word: string): string => `${n === 0 ? 'no' : n} ${word}${n === 1 ? '' : 's'}`;

/** What no sheet and no eye can tell from flat, mm. */
const FLAT = 0.001;

/** Three significant figures, without an exponent; below a ten-thousandth nobody needs to know how far. */
const plain = (value: number): string =>
  value === 0 ? '0' : Math.abs(value) < 1e-4 ? 'below 0.0001' : String(Number(value.toPrecision(3)));
