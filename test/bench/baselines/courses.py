# What a practitioner would write in NumPy for mean animals under weather: arrays over replicates, patches and classes.
#   courses.py NUMBERS REPLICATES SEED: animals at the end a line, then seconds of processor time
import sys
import time

import numpy as np

lines = open(sys.argv[1]).read().split("\n")
given = {lines[i].split()[0]: np.array(lines[i + 1].split(), float) for i in range(0, len(lines) - 1, 2)}
replicates, rng = int(sys.argv[2]), np.random.default_rng(int(sys.argv[3]))
P, C, years = given["shape"].astype(int)
survival = given["survival"].reshape(P, C)
births = given["births"].reshape(P, C)
leaving = given["leaving"].reshape(P, C)
ways, ends = given["ways"].astype(int), given["ends"].astype(int)
one = np.zeros((P, P))
for p in range(P):
    one[ends[ways[p] : ways[p + 1]], p] = given["chances"][ways[p] : ways[p + 1]]
factor = np.zeros((P, P))
starts = given["factor-start"].astype(int)
for p in range(P):
    here = slice(starts[p], starts[p + 1])
    factor[p, given["factor-column"][here].astype(int)] = given["factor-weight"][here]
tables = given["distributions"].reshape(C, P, 4)
a, b, scale = (tables[:, :, k].T for k in (1, 2, 3))

began = time.process_time()
n = np.tile(given["start"].reshape(P, C), (replicates, 1, 1))
for year in range(years):
    weather = rng.standard_normal((replicates, P)) @ factor.T
    lives = survival * scale / (1 + np.exp(-a - b * weather[:, :, None]))
    lives[:, :, 0] /= 1 + given["crowding"] * n.sum(axis=2)
    n *= lives
    leavers = n * leaving
    n += one @ leavers - leavers
    n[:, :, -1] += n[:, :, -2]
    n[:, :, 1:-1] = n[:, :, :-2].copy()
    n[:, :, 0] = (births[:, 2:] * n[:, :, 2:]).sum(axis=2)
seconds = time.process_time() - began
print("\n".join(repr(float(total)) for total in n.sum(axis=(1, 2))))
print("seconds", seconds)
