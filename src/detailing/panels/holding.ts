import type { Job } from '../../model/job/index.js';
import type { PanelHold } from '../../model/parts.js';

/** What holds a panel and how far it reaches over it; what it bears is a matter of strength and null here. */
export function panelHold(job: Job, fixings: number, edgeLoss: number): PanelHold {
  const { holdBy, bite_mm } = job.panels;
  const reaches = holdBy === 'channel' || holdBy === 'clips';
  return {
    by: holdBy,
    fixings: holdBy === 'channel' || holdBy === 'none' ? 0 : fixings,
    // What is left of the bite once the panel has shrunk away from one edge and moved over by its play.
    bite: reaches ? bite_mm - edgeLoss : null,
    pressure: null,
    suction: null,
  };
}

/** Why the panel is held by nothing, in words ('': nothing was chosen); null: it is held. */
export function whyNotHeld({ by, bite, fixings }: PanelHold, diameter: number): string | null {
  if (by === 'none') return '';
  if (bite !== null && bite <= 0)
    return `the ${by === 'channel' ? 'channel does' : 'clips do'} not reach over it once it has moved`;
  if (by === 'channel' || fixings > 0) return null;
  return by === 'clips'
    ? 'no strut runs along its edges'
    : `there is no room for a fixing with a hole of ${diameter.toFixed(1)} mm`;
}

/** The holding in words, for lists. */
export function sayHold({ by, fixings, bite, pressure, suction }: PanelHold): string {
  if (by === 'none') return 'nothing';
  const force = (n: number | null): string =>
    n === null ? 'not stated' : n === Infinity ? 'carried by the struts' : `${Math.floor(n)} N`;
  const reach = bite === null ? '' : `, bite ${bite.toFixed(1)} mm`;
  // A channel is fastened in the workshop's own way.
  const rest = by === 'channel' ? "; the channel's own fastening is not judged" : '';
  return `${by === 'channel' ? 'edge channel' : `${fixings} ${by}`}${reach}; pressure ${force(pressure)}, suction ${force(suction)}${rest}`;
}
