import type { Job } from '../../model/job/index.js';
import type { PanelHold, PanelPart } from '../../model/parts.js';

/** What holds a panel and how much it holds. */
export function panelHold(job: Job, seating: PanelPart['seating'], fixings: number, edgeLoss: number): PanelHold {
  const { holdBy, bite_mm, fixingCapacity_N } = job.panels;
  if (holdBy === 'none') return { by: 'none', fixings: 0, bite: null, pressure: null, suction: null };
  if (holdBy === 'channel') {
    // What is left of the bite once the panel has shrunk away from one edge and moved over by its play.
    const bite = bite_mm - edgeLoss;
    return { by: holdBy, fixings: 0, bite, pressure: null, suction: null };
  }
  const each = fixingCapacity_N ?? null;
  const all = each === null ? null : each * fixings;
  // A panel over the struts is pressed onto them and hangs on its fixings in suction; one under them the other way.
  return {
    by: holdBy,
    fixings,
    bite: holdBy === 'clips' ? bite_mm - edgeLoss : null,
    pressure: seating === 'over' ? Infinity : all,
    suction: seating === 'under' ? Infinity : all,
  };
}

/** The holding in words, for lists. */
export function sayHold(hold: PanelHold): string {
  const force = (n: number | null): string =>
    n === null ? 'not stated' : n === Infinity ? 'carried by the struts' : `${Math.round(n)} N`;
  if (hold.by === 'none') return 'nothing';
  if (hold.by === 'channel') return `edge channel, bite ${hold.bite!.toFixed(1)} mm; pressure and suction not stated`;
  return `${hold.fixings} ${hold.by}; pressure ${force(hold.pressure)}, suction ${force(hold.suction)}`;
}
