/** Below this share of what their sizes allow, two lists of forces say nothing of each other's sign. */
const UNRELATED = 0.1;

/**
 * The sign that turns areas into forces: the job's, else the one that agrees with the given forces over all struts
 * (sum of products), else null: turning the function over the cells upside down gives the same areas, so nothing in the
 * diagram itself decides.
 */
export function signOf(areas: Float64Array, given: Float64Array | null, wanted: 1 | -1 | undefined): 1 | -1 | null {
  if (wanted !== undefined) return wanted;
  if (!given) return null;
  let [product, a, b] = [0, 0, 0];
  areas.forEach((area, m) => {
    product += area * given[m];
    a += area * area;
    b += given[m] * given[m];
  });
  if (Math.abs(product) <= UNRELATED * Math.sqrt(a * b)) return null;
  return product > 0 ? 1 : -1;
}
