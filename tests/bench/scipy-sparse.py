"""Factor, solve and buckle a symmetric matrix with scipy: reads raw arrays from a folder, prints CPU milliseconds as JSON."""
import json
import resource
import sys
import time

import numpy as np
import scipy.sparse as sp
import scipy.sparse.linalg as la

folder = sys.argv[1]


def read(name):
    starts = np.fromfile(f"{folder}/{name}.starts", dtype=np.int32)
    indices = np.fromfile(f"{folder}/{name}.indices", dtype=np.int32)
    values = np.fromfile(f"{folder}/{name}.values", dtype=np.float64)
    n = len(starts) - 1
    low = sp.csc_matrix((values, indices, starts), shape=(n, n))
    return (low + sp.tril(low, -1).T).tocsc()


k = read("k")
n = k.shape[0]
right = np.column_stack([np.sin(np.arange(n) * (c + 1.0)) for c in range(8)])
best = None
for order in ("MMD_AT_PLUS_A", "COLAMD"):
    # Minimum degree of A + A' takes minutes of ordering on the large grids, where COLAMD takes two seconds.
    if order == "MMD_AT_PLUS_A" and n > 40000:
        continue
    t = time.process_time()
    lu = la.splu(k, permc_spec=order, diag_pivot_thresh=0.0, options={"SymmetricMode": order == "MMD_AT_PLUS_A"})
    factor = time.process_time() - t
    t = time.process_time()
    lu.solve(right)
    solve = time.process_time() - t
    if best is None or factor < best[0]:
        best = (factor, solve)
out = {"factor": 1000 * best[0], "solve": 1000 * best[1]}
if len(sys.argv) > 2:
    kg = read("kg")
    t = time.process_time()
    # K x = lambda (-Kg) x about zero, in buckling mode: the least positive factors.
    values = la.eigsh(k, k=4, M=-kg, sigma=float(sys.argv[2]), which="LM", mode="buckling", return_eigenvectors=False)
    out["buckling"] = 1000 * (time.process_time() - t)
    out["factors"] = sorted(float(v) for v in values)
out["MB"] = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss / 1024
print(json.dumps(out))
