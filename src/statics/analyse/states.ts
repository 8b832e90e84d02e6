import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { MechanismNote, StateCounts } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import { mechanismInWords } from '../mechanism-words.js';
import type { PinFigure } from '../pin-figure.js';
import { rigidMotions } from '../rigid-body.js';
import { countStates, type FigureCounts, loadIsCompatible, NEAR_MECHANISM } from '../state-counts.js';
import { figureOf, piecesOf } from './figure.js';

/**
 * Singular values of the equilibrium matrix (unit bar directions) up to this count as nought: what coordinates rounded to a
 * thousandth of a millimetre in a strut of some hundred leave, and far below any error of a cut length.
 */
export const ROUNDED = 1e-5;

/** Counts of the pinned figure with their mechanisms in words. */
export interface States {
  readonly figure: PinFigure;
  readonly counts: FigureCounts;
  readonly notes: readonly MechanismNote[];
  readonly findings: readonly Finding[];
  /** Whether the supports hold every piece as a body. */
  readonly held: boolean;
}

/** Counts the states of the truss on its supports; what its supports leave free is a stop where it has any. */
export function statesOf(topology: Topology): States {
  const known = counted.get(topology);
  if (known) return known;
  const states = count(topology, figureOf(topology));
  counted.set(topology, states);
  return states;
}

/** Parts change between passes over one truss, its counts do not. */
const counted = new WeakMap<Topology, States>();

function count(topology: Topology, figure: PinFigure): States {
  const { truss } = topology;
  const counts = countStates(figure, ROUNDED);
  const marks = truss.nodes.map((n) => n.mark);
  const at = truss.nodes.map((n) => n.at);
  const say = (shape: Float64Array) => mechanismInWords(marks, at, figure.ends, shape);
  const notes = counts.mechanismShapes.map((m) => noteOf(m, () => say(m.shape)));
  const findings: Finding[] = counts.nearMechanisms.map((m) =>
    finding('near-mechanism', 'truss', {
      value: m.singularValue,
      limit: NEAR_MECHANISM,
      about: { words: say(m.shape).words },
    }),
  );
  const supported = truss.supports.length > 0;
  const pieces = piecesOf(topology);
  let held = supported;
  if (supported)
    for (const piece of pieces) {
      const free = rigidMotions(figure, piece);
      if (free.length === 0) continue;
      held = false;
      if (pieces.length > 1) findings.push(finding('piece-unsupported', marks[piece[0]!]!, { value: piece.length }));
      else
        for (const motion of free)
          findings.push(finding('truss-unsupported', 'truss', { about: { words: say(motion).words } }));
    }
  return { figure, counts, notes, findings, held };
}

/** The note on a mechanism; its words are looked for when they are read. */
function noteOf(
  { shape, singularValue }: FigureCounts['mechanismShapes'][number],
  say: () => Pick<MechanismNote, 'words' | 'nodes'>,
): MechanismNote {
  let said: Pick<MechanismNote, 'words' | 'nodes'> | undefined;
  const saying = () => (said ??= say());
  return {
    get words() {
      return saying().words;
    },
    get nodes() {
      return saying().nodes;
    },
    shape,
    singularValue,
  };
}

/** The record of the counts; `loads`: forces over all nodes of each case, N, three a node. */
export function countsRecord(states: States, loads: readonly Float64Array[]): StateCounts {
  const { counts, notes, figure } = states;
  const rigid = loads.length > 0 ? rigidMotions(figure) : [];
  return {
    rank: counts.rank,
    selfStressStates: counts.selfStressStates,
    mechanisms: counts.mechanisms,
    rigidBody: counts.rigidBody,
    mechanismNotes: notes,
    loadCompatible: loads.length > 0 ? loads.every((p) => loadIsCompatible(counts, rigid, p)) : null,
  };
}
