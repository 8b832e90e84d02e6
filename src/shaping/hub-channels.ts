import { LEAST_WALL } from '../detailing/systems/printing.js';
import { floorHoles } from '../detailing/systems/vent.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { HubPart } from '../model/parts.js';
import { boltHolesOf, type Channel, pinOf, plateHolesOf, screwHolesOf, ventOf } from './channels.js';
import type { HubSpace } from './hub-space.js';

/** Corners of the polygons that bores and holes are made as, mm. */
const CHORDS = 0.1;

/** Every hole of a hub beside its bores; what found no way is told. */
export function channelsOf(hub: HubPart, job: Job, space: HubSpace, findings: Finding[]): Channel[] {
  const web = LEAST_WALL[job.nodes['process']] + CHORDS;
  const channels: Channel[] = [...plateHolesOf(space, web), ...screwHolesOf(space)];
  hub.sockets.forEach((s, i) => {
    if (s.pin > 0) {
      const pin = pinOf(space, i, web);
      if (pin) channels.push(pin);
      else findings.push(finding('pin-meets-bore', hub.mark, { value: s.pin, about: { strut: s.strut } }));
    }
    channels.push(...boltHolesOf(space, i));
    // A cradle is open on its side.
    if (!space.sleeves[i]!.hollow || s.detail === 'drop-in') return;
    const wanted = floorHoles(s, job);
    for (const diameter of wanted) {
      const hole = ventOf(space, i, diameter, web);
      if (!hole) continue;
      channels.push(hole);
      if (diameter < wanted[0]!)
        findings.push(
          finding('drain-narrowed', hub.mark, { value: diameter, limit: wanted[0]!, about: { strut: s.strut } }),
        );
      return;
    }
    if (wanted.length > 0) findings.push(finding('vent-left-out', hub.mark, { about: { strut: s.strut } }));
  });
  return channels;
}
