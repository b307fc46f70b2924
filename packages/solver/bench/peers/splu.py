"""SciPy's SuperLU on a network file of one conductor: edge list in, all voltages out. Prints one JSON line (ms)."""

import json
import resource
import sys
import time

import numpy as np
import scipy.sparse as sparse
from scipy.sparse.linalg import splu

path, repeats = sys.argv[1], int(sys.argv[2])
data = open(path, "rb").read()
block, buses, runs, _ = np.frombuffer(data, np.int32, 4)
assert block == 1
start = np.frombuffer(data, np.int32, runs, 16)
end = np.frombuffer(data, np.int32, runs, 16 + 4 * runs)
siemens = np.frombuffer(data, np.float64, runs, 16 + 8 * runs)
amps = np.frombuffer(data, np.float64, buses, 16 + 16 * runs)


def volts():
    a, b = start < buses, end < buses
    both = a & b
    rows = np.concatenate([start[a], end[b], start[both], end[both]])
    columns = np.concatenate([start[a], end[b], end[both], start[both]])
    values = np.concatenate([siemens[a], siemens[b], -siemens[both], -siemens[both]])
    matrix = sparse.coo_matrix((values, (rows, columns)), shape=(buses, buses)).tocsc()
    return splu(matrix, permc_spec="MMD_AT_PLUS_A", diag_pivot_thresh=0.0, options={"SymmetricMode": True}).solve(amps)


took = []
for _ in range(repeats):
    began = time.perf_counter()
    x = volts()
    took.append(1000 * (time.perf_counter() - began))
took.sort()
if len(sys.argv) > 3:
    x.tofile(sys.argv[3])
print(
    json.dumps(
        {
            "median": took[repeats // 2],
            "low": took[repeats // 10],
            "high": took[repeats - 1 - repeats // 10],
            "peakMB": resource.getrusage(resource.RUSAGE_SELF).ru_maxrss / 1024,
        }
    )
)
