import type { Job } from '../../model/job/index.js';
import type { Material } from '../../model/material.js';

/** Change of temperature that gaps must take where the job gives none, K; common practice, no source. */
const INDOORS_K = 15;
const OUTDOORS_K = 40;
/** Growth of plastic sheet by humidity outdoors: 0.2 to 0.6 % for acrylic in published data sheets, its middle. */
const OUTDOORS_HUMIDITY = 0.004;

/** Whether the thing stands in the weather. */
export const isOutdoors = (job: Job): boolean => job.use === 'outdoor' || job.use === 'overhead';

/** Growth of a sheet, mm a mm: expansion x change of temperature + growth by humidity. */
export function movementStrain(job: Job, material: Material | null): number {
  const kelvin = job.panels.movement_K ?? (isOutdoors(job) ? OUTDOORS_K : INDOORS_K);
  const humidity = job.panels.humidity ?? (isOutdoors(job) ? OUTDOORS_HUMIDITY : 0);
  return (material?.expansion ?? 0) * kelvin + humidity;
}
