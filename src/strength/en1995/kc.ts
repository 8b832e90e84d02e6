/** Slenderness below which no reduction is made, EN 1995-1-1 6.3.2 (2). */
export const STOCKY = 0.3;
/** betac, EN 1995-1-1 (6.29): solid timber 0.2 (seen in a textbook), glulam and LVL 0.1 (from memory). */
export const betaC = (family: string): number => (family === 'glulam' ? 0.1 : 0.2);

/** lambda_rel = (lambda / pi) sqrt(fc0k / E0.05), EN 1995-1-1 (6.21), (6.22). Strength and modulus in MPa. */
export const relativeSlenderness = (lambda: number, fc0k: number, e005: number): number =>
  (lambda / Math.PI) * Math.sqrt(fc0k / e005);

/** kc = 1 / (k + sqrt(k² - lambda_rel²)), k = (1 + betac (lambda_rel - 0.3) + lambda_rel²) / 2; 1 up to lambda_rel = 0.3. EN 1995-1-1 (6.25) to (6.28). */
export function kc(lambdaRel: number, beta: number): number {
  if (lambdaRel <= STOCKY) return 1;
  const k = 0.5 * (1 + beta * (lambdaRel - STOCKY) + lambdaRel ** 2);
  return 1 / (k + Math.sqrt(k ** 2 - lambdaRel ** 2));
}
