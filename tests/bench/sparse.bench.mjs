import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { analyse } from '../../dist/maths/sparse/analyse.js';
import { eliminateColumns } from '../../dist/maths/sparse/column-elimination.js';
import { factorise } from '../../dist/maths/sparse/factorise.js';
import { leftNullSpace } from '../../dist/maths/sparse/null-space.js';
import { backSolve, solve } from '../../dist/maths/sparse/solve.js';
import { cross, normalise, perpendicular } from '../../dist/maths/vec3.js';
import { assembleFrame } from '../../dist/statics/frame/assemble.js';
import { bucklingFactors } from '../../dist/statics/frame/frame-buckling.js';
import { geometricStiffness } from '../../dist/statics/frame/geometric-stiffness.js';
import { toGlobal } from '../../dist/statics/frame/rotate.js';
import { prepareFrame } from '../../dist/statics/frame/solve-frame.js';
import { blockPoints, numberFreedoms } from '../../dist/statics/freedoms.js';
import { barDirections, equilibriumMatrix } from '../../dist/statics/pin-figure.js';
import { pinStiffness } from '../../dist/statics/pin-truss.js';
import { countStates } from '../../dist/statics/state-counts.js';
import { asFrame, doubleLayerGrid } from './double-layer-grid.mjs';

export const title = 'Sparse kernel: factor, right-hand sides, counts, buckling (CPU ms; double-layer grids)';

/** CPU milliseconds of f, best of `times`: a busy machine slows the clock, not the count. */
function cpu(f, times = 1) {
  let best = Number.POSITIVE_INFINITY;
  let result;
  for (let k = 0; k < times; k++) {
    const before = process.cpuUsage();
    result = f();
    const spent = process.cpuUsage(before);
    best = Math.min(best, (spent.user + spent.system) / 1000);
  }
  return { ms: best, result };
}

const hasScipy = spawnSync('python3', ['-c', 'import scipy']).status === 0;

function scipy(matrices, sigma) {
  if (!hasScipy) return null;
  const folder = mkdtempSync(join(tmpdir(), 'sparse-bench-'));
  for (const [name, m] of Object.entries(matrices))
    for (const part of ['starts', 'indices', 'values']) writeFileSync(join(folder, `${name}.${part}`), m[part]);
  const script = fileURLToPath(new URL('./scipy-sparse.py', import.meta.url));
  const run = spawnSync('python3', [script, folder, ...(sigma === undefined ? [] : [String(sigma)])], {
    encoding: 'utf8',
  });
  rmSync(folder, { recursive: true });
  return run.status === 0 ? JSON.parse(run.stdout) : null;
}

const round = (v) => (v === null || v === undefined ? '-' : v >= 100 ? v.toFixed(0) : v.toFixed(1));

function matrixOf(n, kind) {
  const figure = doubleLayerGrid(n);
  if (kind === 'truss') {
    const freedoms = numberFreedoms(figure.fixed, 3);
    const { lengths, units } = barDirections(figure);
    return {
      figure,
      freedoms,
      k: pinStiffness(
        figure,
        freedoms,
        lengths.map((l) => 7.7e6 / l),
        units,
      ),
    };
  }
  const frame = asFrame(figure, { normalise, perpendicular, cross });
  const prepared = n <= 50 ? prepareFrame(frame) : null;
  if (prepared) return { figure, frame, prepared, freedoms: prepared.freedoms, k: prepared.stiffness };
  const freedoms = numberFreedoms(frame.fixed, 6);
  return {
    figure,
    frame,
    freedoms,
    k: assembleFrame(frame, freedoms, (e) => toGlobal(frame.members[e], chain(frame.members[e]))),
  };
}

const { chainStiffness: chain } = await import('../../dist/statics/frame/chain-stiffness.js');

export async function run(print) {
  print(
    '| nodes, freedoms | order | analyse | factor | 8 right-hand sides | residual | MB of factor | scipy factor / solve / MB | ml-matrix |',
  );
  print('|---|---|---|---|---|---|---|---|---|');
  const sizes = process.env.BENCH_LARGE === '0' ? [16, 50] : [16, 50, 100];
  for (const n of sizes)
    for (const kind of ['truss', 'frame']) {
      const { figure, freedoms, k } = matrixOf(n, kind);
      const options = { blockStarts: freedoms.blockStarts, points: blockPoints(freedoms, figure.nodes) };
      const times = n < 100 ? 3 : 1;
      const a = cpu(() => analyse(k, options), times);
      const f = cpu(() => factorise(a.result, k), times);
      const right = Array.from({ length: 8 }, (_, c) =>
        Float64Array.from({ length: k.columns }, (_, i) => Math.sin(i * (c + 1))),
      );
      const s = cpu(() => backSolve(f.result, right), times);
      const { residual } = solve(f.result, k, right);
      const other = scipy({ k });
      const dense = k.columns < 2000 ? cpu(() => denseSolve(k, right[0])).ms : null;
      print(
        `| ${figure.nodes.length / 3}, ${k.columns} | ${a.result.ordering} | ${round(a.ms)} | ${round(f.ms)} | ${round(s.ms)} | ${Math.max(...residual).toExponential(1)} | ${round((8 * f.result.values.length) / 2 ** 20)} | ${other ? `${round(other.factor)} / ${round(other.solve)} / ${round(other.MB)}` : 'not installed'} | ${round(dense)} |`,
      );
    }

  print('\n| struts | elimination | basis of self-stress | whole count | arbiter | s, m |');
  print('|---|---|---|---|---|---|');
  for (const n of [8, 25, 100]) {
    const figure = doubleLayerGrid(n);
    const freedoms = numberFreedoms(figure.fixed, 3);
    const a = equilibriumMatrix(figure, freedoms);
    const order = Array.from({ length: a.columns }, (_, e) => e).sort(
      (p, q) => reach(figure, p) - reach(figure, q) || p - q,
    );
    const rank = new Float64Array(freedoms.count);
    freedoms.of.forEach((f, i) => {
      if (f >= 0) rank[f] = figure.nodes[i - (i % 3)];
    });
    const e = cpu(() => eliminateColumns(a, order, rank), n < 100 ? 3 : 1);
    const basis = cpu(() => {
      for (let s = 0; s < e.result.dependent.length; s++) e.result.columnNull(s);
    });
    const arbiter =
      n <= 25
        ? cpu(() =>
            leftNullSpace(a, { blockStarts: freedoms.blockStarts, points: blockPoints(freedoms, figure.nodes) }),
          ).ms
        : null;
    const whole = n <= 25 ? cpu(() => countStates(figure)) : null;
    print(
      `| ${a.columns} | ${round(e.ms)} | ${round(basis.ms)} | ${round(whole?.ms)} | ${round(arbiter)} | ${a.columns - e.result.rank}, ${freedoms.count - e.result.rank} |`,
    );
  }

  print('\n| nodes | buckling, 4 factors | lowest | Sturm | scipy | its lowest |');
  print('|---|---|---|---|---|---|');
  for (const n of [16, 50]) {
    const { frame, prepared, freedoms, k } = matrixOf(n, 'frame');
    // Every strut compressed alike: many struts near their limit at once, a hard case.
    const axial = Float64Array.from(frame.members, (_, e) => -100 - (e % 7));
    const b = cpu(() => bucklingFactors(prepared, axial), n < 50 ? 3 : 1);
    const kg = assembleFrame(frame, freedoms, (e) =>
      toGlobal(frame.members[e], geometricStiffness(frame.members[e], axial[e])),
    );
    const other = scipy({ k, kg }, 0.97 * b.result.factors[0]);
    print(
      `| ${frame.nodes.length / 3} | ${round(b.ms)} | ${b.result.factors[0].toPrecision(10)} | ${b.result.sturm} | ${round(other?.buckling)} | ${other?.factors?.[0]?.toPrecision(10) ?? '-'} |`,
    );
  }
}

const reach = (figure, e) => Math.max(figure.nodes[3 * figure.ends[2 * e]], figure.nodes[3 * figure.ends[2 * e + 1]]);

function denseSolve(k, b) {
  const m = Matrix.zeros(k.rows, k.columns);
  for (let j = 0; j < k.columns; j++)
    for (let p = k.starts[j]; p < k.starts[j + 1]; p++) {
      m.set(k.indices[p], j, k.values[p]);
      m.set(j, k.indices[p], k.values[p]);
    }
  return new CholeskyDecomposition(m).solve(Matrix.columnVector(Array.from(b)));
}
