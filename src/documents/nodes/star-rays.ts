import { ballRadius } from '../../detailing/systems/drilled-ball.js';
import type { HubPart } from '../../model/parts.js';
import { jigSetting } from './drilling.js';

/** A strip of a ball's star: from the first bore along the ball to another. */
export interface StarRay {
  readonly strut: string;
  /** Arc on the ball between the two bores' middles, mm. */
  readonly length: number;
  /** Direction on the paper, anticlockwise from that of the second bore, rad. */
  readonly angle: number;
  readonly bore: number;
}

/** Strips from the first bore of a ball to every other: as long as the arc between them, in the direction of the jig's turn. */
export function starRays(hub: HubPart): StarRay[] {
  const radius = ballRadius(hub);
  return hub.sockets.slice(1).map((s) => {
    const { tilt, turn } = jigSetting(hub, s);
    return {
      strut: s.strut,
      length: (radius * tilt * Math.PI) / 180,
      angle: (turn * Math.PI) / 180,
      bore: s.bore as number,
    };
  });
}
