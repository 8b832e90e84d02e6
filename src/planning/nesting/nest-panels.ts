import { signedArea, toRing } from '../../maths/polygon/ring.js';
import type { Run } from '../../model/run.js';
import { requestFaults } from './faults.js';
import { type Lane, type LanePlan, nestLane, piecesOf } from './lane.js';
import type { NestingAnswer, NestingRequest } from './request.js';

/** Evaluations that the usual search may spend: about a second on one core for a dozen panels, ten for two hundred. */
const LEAST_EVALUATIONS = 1e6;
const EVALUATIONS_A_PANEL = 4e5;
const MOST_EVALUATIONS = 20e6;
/** Searches side by side; few panels are searched as well by one. Their number does not depend on the machine. */
const LANES = 2;
const ONE_LANE_BELOW = 5;
/** Shares of the search after which all lanes go on from the best plan; the last turn ends it with small steps. */
const TURNS = [0.5, 0.3, 0.2] as const;
/** Under this many evaluations a lane is not split into turns: it would spend them on beginning again. */
const LEAST_TURN = 2e6;
/** Sets the seeds of lanes and turns apart. */
const [LANE_STRIDE, TURN_STRIDE] = [7919, 104_729] as const;

/** What a caller can bring. */
export interface NestingHelp {
  /** ms from any start, the same in every thread (as Date.now); absent: a time limit is not heeded. */
  readonly clock?: () => number;
  /** Does the task `nest-lane` on every input, perhaps in threads; absent: here, one after another. */
  readonly each?: Run['each'];
}

/**
 * Lays panels on sheets: as few sheets as it finds, then the last one filled from its left, so that one offcut
 * stays whole. Nothing is mirrored; spacing and margin hold to 0.001 mm; the same request gives the same plan on
 * every machine and with any number of threads unless a time limit cuts it short, which it then says. Panels with a fault, larger than every
 * sheet, or left when the sheets run out are named, never dropped in silence.
 */
export async function nestPanels(request: NestingRequest, help: NestingHelp = {}): Promise<NestingAnswer> {
  const faults = requestFaults(request);
  const general = faults.some((f) => !f.place.startsWith('panels['));
  if (general) return { sheets: [], lowerBound: 0, unplaced: [], faults };
  const bad = new Set(faults.map((f) => f.place));
  const panels = request.panels.filter((panel, index) => !bad.has(`panels[${index}] ${panel.mark}`));
  const marks = piecesOf(panels);
  const plan = await bestPlan(request, panels, marks.length, help);

  const areas = new Map(panels.map((p) => [p.mark, Math.abs(signedArea(toRing(p.outline)))]));
  const unplaced = new Map<string, NestingAnswer['unplaced'][number]>();
  for (const { piece, reason } of plan.left) {
    const mark = marks[piece]!;
    unplaced.set(mark, { mark, reason, quantity: (unplaced.get(mark)?.quantity ?? 0) + 1 });
  }
  return {
    sheets: plan.sheets.map(({ kind, placed }) => {
      const sheet = request.sheets[kind]!;
      const whole = sheet.outline ? Math.abs(signedArea(toRing(sheet.outline))) : sheet.width * sheet.height;
      return {
        sheet: sheet.name,
        placements: placed.map((p) => ({ mark: marks[p.piece]!, x: p.x, y: p.y, rotation_deg: p.degrees })),
        yield: placed.reduce((sum, p) => sum + areas.get(marks[p.piece]!)!, 0) / whole,
      };
    }),
    lowerBound: plan.lowerBound,
    unplaced: [...unplaced.values()],
    faults,
    ...(plan.hurried ? { stopped: 'time' as const } : {}),
  };
}

/** The best plan of all lanes, turn after turn. */
async function bestPlan(
  request: NestingRequest,
  panels: Lane['panels'],
  count: number,
  { clock, each }: NestingHelp,
): Promise<LanePlan> {
  const usual = Math.min(MOST_EVALUATIONS, LEAST_EVALUATIONS + EVALUATIONS_A_PANEL * count);
  const lanes = count < ONE_LANE_BELOW ? 1 : LANES;
  const evaluations = (usual * (request.effort ?? 1)) / lanes;
  const limit = request.timeLimitMs !== undefined && clock ? request.timeLimitMs : null;
  const began = limit === null ? 0 : clock!();
  const turns = lanes === 1 || (evaluations * TURNS[0] < LEAST_TURN && limit === null) ? [1] : TURNS;
  let best: LanePlan | null = null;
  let hurried = false;
  let gone = 0;
  for (const [turn, share] of turns.entries()) {
    // Lanes side by side have the turn's time each; lanes in one thread have it one after another.
    const slot = (lane: number): Lane['time'] => {
      if (limit === null) return null;
      const parts = each ? 1 : lanes;
      const at = (k: number): number => began + limit * (gone + (share * k) / parts);
      return each ? { from: at(0), to: at(1) } : { from: at(lane), to: at(lane + 1) };
    };
    const start: LanePlan | null = best;
    const inputs = Array.from(
      { length: lanes },
      (_, lane): Lane => ({
        panels,
        sheets: request.sheets,
        spacing: request.spacing,
        margin: request.margin,
        seed: (request.seed ?? 1) + LANE_STRIDE * lane + TURN_STRIDE * turn,
        evaluations: evaluations * share,
        start,
        last: turn === turns.length - 1,
        // One lane begins without: where edge-aligned angles do, it comes farther.
        turning: lane + turn > 0 || lanes === 1,
        time: slot(lane),
      }),
    );
    const take = (plan: LanePlan): void => {
      hurried ||= plan.hurried;
      if (!best || isBetter(plan, best)) best = plan;
    };
    if (each) await each<Lane, LanePlan>('nest-lane', inputs, take);
    else for (const input of inputs) take(nestLane(input, clock ?? null));
    gone += share;
  }
  return { ...best!, hurried };
}

/** Fewer panels left over, then fewer sheets, then less of them taken up; of equals the earlier. */
function isBetter(a: LanePlan, b: LanePlan): boolean {
  return (a.left.length - b.left.length || a.sheets.length - b.sheets.length || a.taken - b.taken) < 0;
}
