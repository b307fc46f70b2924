"""Node volts of circuits by SciPy: JSON circuits on standard input, a list of volts for each on standard output."""

import json
import sys

import numpy as np
import scipy.sparse as sparse
from scipy.sparse.linalg import spsolve


def volts(circuit):
    count = len(circuit["volts"])
    rows, columns, values = [], [], []
    right = np.zeros(count, complex)
    for element in circuit["elements"]:
        y = 1 / complex(*element["z"])
        for a, u in zip(element["nodes"], element["u"]):
            right[a] += u * y * complex(*element["emf"])
            for b, v in zip(element["nodes"], element["u"]):
                rows.append(a)
                columns.append(b)
                values.append(y * u * v)
    for sink in circuit["sinks"]:
        amps = complex(*sink["amps"])
        if sink["a"] >= 0:
            right[sink["a"]] -= amps
        if sink["b"] >= 0:
            right[sink["b"]] += amps
    matrix = sparse.coo_matrix((values, (rows, columns)), shape=(count, count)).tocsc()
    found = np.zeros(count, complex)
    given = [each["node"] for each in circuit["fixed"]]
    found[given] = [complex(*each["volts"]) for each in circuit["fixed"]]
    free = np.setdiff1d(np.arange(count), given)
    if len(free):
        left = matrix[free][:, free]
        known = right[free] - matrix[free][:, given] @ found[given]
        found[free] = spsolve(left.tocsc(), known)
    return [[v.real, v.imag] for v in found]


json.dump([volts(circuit) for circuit in json.load(sys.stdin)], sys.stdout)
