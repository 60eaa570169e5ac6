# Growth of many small matrices in a loop over numpy.linalg.   many.py MATRICES ORDER vectors|growth: growth a line, then seconds of
# processor time
import sys
import time

import numpy as np

order = int(sys.argv[2])
matrices = np.fromfile(sys.argv[1]).reshape(-1, order, order)
growth = []
began = time.process_time()
if sys.argv[3] == "growth":
    for matrix in matrices:
        growth.append(np.abs(np.linalg.eigvals(matrix)).max())
else:
    for matrix in matrices:
        values, right = np.linalg.eig(matrix)
        first = np.abs(values).argmax()
        w = np.abs(right[:, first].real)
        v = np.abs(np.linalg.inv(right)[first].real)
        elasticities = matrix * np.outer(v, w) / (values[first].real * (v @ w))
        growth.append(values[first].real)
seconds = time.process_time() - began
print("\n".join(repr(float(x)) for x in growth))
print("seconds", seconds)
