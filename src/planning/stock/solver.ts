import loadHighs, { type Highs } from 'highs';

let loaded: Promise<Highs> | undefined;

/** The HiGHS solver, loaded once a process (its WebAssembly takes 0.1 s to compile). */
export function linearSolver(): Promise<Highs> {
  loaded ??= loadHighs();
  return loaded;
}

/** The solver ended without an answer: round-off that it could not master. What was found before still stands. */
export class SolverFailed extends Error {}
