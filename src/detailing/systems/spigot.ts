import type { Job } from '../../model/job/index.js';
import type { BoltedEnd, Socket } from '../../model/parts.js';
import { clearance, measuredSize } from './printing.js';
import { SLEEVE_HUB, sizeSocket } from './socket.js';
import type { BarEnd, NodeSystem } from './system.js';

/**
 * A printed hub that goes into the struts: a round spigot into a tube, a plate into the slot of a sawn timber end, bolted. A solid
 * round bar has nothing to go into and gets a sleeve as in the socket system.
 */
export const SPIGOT_SYSTEM: NodeSystem = {
  ...SLEEVE_HUB,
  name: 'spigot',
  title: 'Printed spigots and plates',
  socket(bar, job) {
    const { shape } = bar.section;
    if (shape.kind === 'tube') return tubeSpigot(bar, job, measuredSize(bar.section) - 2 * shape.wall);
    if (shape.kind === 'rectangle') return boltedPlate(bar, job, shape.width, shape.height);
    return sizeSocket(bar, job);
  },
};

/** Spigot = the tube's inside less the process's clearance; as deep as a socket of its own size would be. */
function tubeSpigot(bar: BarEnd, job: Job, inside: number): Socket {
  const bore = inside - clearance(job, bar.section, inside);
  return {
    ...sizeSocket(bar, job),
    bore,
    wall: bore / 2,
    depth: job.nodes.depth_mm ?? job.nodes.depthFactor * inside,
    form: 'spigot',
  };
}

/** Metric bolts, mm. */
const BOLTS = [3, 4, 5, 6, 8, 10, 12, 16] as const;
/** Distances of a row of bolts as multiples of the bolt's diameter: edge, spacing, loaded end (EN 1995-1-1 table 8.4, seen in part), and
 *  from the last bolt to the plate's end (common practice, no source). */
const [EDGE, SPACING, END, PLATE_END] = [3, 5, 7, 2] as const;
const LEAST_END = 80;
/** Under this size a timber end is a model's: the standard's least end distance of 80 mm is left to the strength check. */
const MODEL_SIZE = 40;

/** Two bolts in a row in the middle of the timber's larger side, the plate a third of its smaller side. */
function boltedPlate(bar: BarEnd, job: Job, width: number, height: number): Socket {
  const along = width <= height ? 'y' : 'z';
  const [through, deep] = along === 'y' ? [width, height] : [height, width];
  const plate = through / 3;
  const diameter = [...BOLTS].reverse().find((d) => d * EDGE <= deep / 2) ?? BOLTS[0];
  const endDistance = Math.max(END * diameter, deep < MODEL_SIZE ? 0 : LEAST_END);
  const end: BoltedEnd = {
    plate,
    slot: plate + clearance(job, bar.section, plate),
    bolts: 2,
    diameter,
    spacing: SPACING * diameter,
    endDistance,
    plateEnd: PLATE_END * diameter,
    along,
  };
  return {
    ...sizeSocket(bar, job),
    bore: along === 'y' ? [plate, deep] : [deep, plate],
    wall: plate / 2,
    depth: endDistance + end.spacing + end.plateEnd,
    pin: 0,
    bolted: end,
    form: 'plate',
  };
}
