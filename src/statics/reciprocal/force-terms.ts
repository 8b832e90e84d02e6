/** One wish on the forces: sum over edges of coefficient x force = target, in N, with a weight. */
export interface ForceTerm {
  readonly edges: readonly number[];
  readonly coefficients: readonly number[];
  readonly target: number;
  readonly weight: number;
}

/** w (L t - g), one number a term. */
export function residualOf(terms: readonly ForceTerm[], forces: ArrayLike<number>): Float64Array {
  return Float64Array.from(terms, (term) => {
    let sum = -term.target;
    for (let k = 0; k < term.edges.length; k++) sum += term.coefficients[k] * forces[term.edges[k]];
    return term.weight * sum;
  });
}

/** w L t */
export function applyTerms(terms: readonly ForceTerm[], forces: ArrayLike<number>): Float64Array {
  return Float64Array.from(terms, (term) => {
    let sum = 0;
    for (let k = 0; k < term.edges.length; k++) sum += term.coefficients[k] * forces[term.edges[k]];
    return term.weight * sum;
  });
}

/** L' w r, one number an edge. */
export function spreadTerms(terms: readonly ForceTerm[], residual: ArrayLike<number>, edges: number): Float64Array {
  const h = new Float64Array(edges);
  terms.forEach((term, i) => {
    for (let k = 0; k < term.edges.length; k++) h[term.edges[k]] += term.weight * residual[i] * term.coefficients[k];
  });
  return h;
}
