import type { Flow } from '../../kit/flow.js';
import type { Paper } from '../../kit/paper.js';
import type { Units } from '../../kit/units.js';
import type { PackRecords } from '../../records.js';
import { bucklingPicture } from './buckling.js';
import { deflectionPicture } from './deflection.js';
import { forcesPicture } from './forces.js';
import { mechanismPictures } from './mechanisms.js';
import { utilisationPicture } from './utilisation.js';

/** Every picture for which there is something to show. */
export function picturesSection(paper: Paper, flow: Flow, records: PackRecords, units: Units): void {
  forcesPicture(paper, flow, records, units);
  utilisationPicture(paper, flow, records);
  deflectionPicture(paper, flow, records, units);
  bucklingPicture(paper, flow, records);
  mechanismPictures(paper, flow, records);
}
