# Growth of many small matrices in a loop over numpy.linalg.   many.py MATRICES ORDER vectors|growth [PROCESSES]: growth a line, then
# seconds of processor time; with several processes side by side the seconds from when all are ready to when the last is done
import multiprocessing
import sys
import time

import numpy as np

order = int(sys.argv[2])
matrices = np.fromfile(sys.argv[1]).reshape(-1, order, order)


def growth_of(matrix):
    return np.abs(np.linalg.eigvals(matrix)).max()


def growth_and_elasticities(matrix):
    values, right = np.linalg.eig(matrix)
    first = np.abs(values).argmax()
    w = np.abs(right[:, first].real)
    v = np.abs(np.linalg.inv(right)[first].real)
    elasticities = matrix * np.outer(v, w) / (values[first].real * (v @ w))
    return values[first].real, elasticities


def solve(first, last):
    growth = []
    if sys.argv[3] == "growth":
        for matrix in matrices[first:last]:
            growth.append(growth_of(matrix))
    else:
        for matrix in matrices[first:last]:
            growth.append(growth_and_elasticities(matrix)[0])
    return growth


processes = int(sys.argv[4]) if len(sys.argv) > 4 else 1
if processes == 1:
    began = time.process_time()
    growth = solve(0, len(matrices))
    seconds = time.process_time() - began
else:
    ends = [len(matrices) * i // processes for i in range(processes + 1)]
    with multiprocessing.get_context("fork").Pool(processes) as pool:
        pool.starmap(solve, [(i, i + 1) for i in range(processes)], 1)
        began = time.perf_counter()
        shares = pool.starmap(solve, list(zip(ends, ends[1:])), 1)
        seconds = time.perf_counter() - began
    growth = [value for share in shares for value in share]
print("\n".join(repr(float(x)) for x in growth))
print("seconds", seconds)
