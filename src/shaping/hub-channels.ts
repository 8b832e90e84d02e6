import { LEAST_WALL } from '../detailing/systems/printing.js';
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
    if (job.nodes.vent_mm > 0 && space.sleeves[i]!.hollow && s.detail !== 'drop-in') {
      const vent = ventOf(space, i, job.nodes.vent_mm, web);
      if (vent) channels.push(vent);
      else findings.push(finding('vent-left-out', hub.mark, { about: { strut: s.strut } }));
    }
  });
  return channels;
}
