# What a practitioner would write in NumPy for the path without chance of many sets of parameters at once.   path.py NUMBERS SETS
import sys
import time

import numpy as np

lines = open(sys.argv[1]).read().split("\n")
given = {lines[i].split()[0]: np.array(lines[i + 1].split(), float) for i in range(0, len(lines) - 1, 2)}
P, C, years = given["shape"].astype(int)
sets = np.arange(int(sys.argv[2]))
less = lambda step: (1 - 0.001 * (sets * step % 100))[:, None, None]
ways = given["ways"].astype(int)
one = np.zeros((P, P))
for p in range(P):
    one[given["ends"][ways[p] : ways[p + 1]].astype(int), p] = given["chances"][ways[p] : ways[p + 1]]

began = time.process_time()
lives = given["survival"].reshape(P, C) * less(3)
births = given["births"].reshape(P, C) * less(7)
moves = one * less(11)
leaving = given["leaving"].reshape(P, C)[:, 0]
n = np.tile(given["start"].reshape(P, C), (len(sets), 1, 1))
for year in range(years):
    crowded = 1 + given["crowding"] * n.sum(axis=2)
    n *= lives
    n[:, :, 0] /= crowded
    leavers = n[:, :, 0] * leaving
    n[:, :, 0] += (moves @ leavers[:, :, None])[:, :, 0] - leavers
    n[:, :, -1] += n[:, :, -2]
    n[:, :, 1:-1] = n[:, :, :-2].copy()
    n[:, :, 0] = (births[:, :, 1:] * n[:, :, 1:]).sum(axis=2)
seconds = time.process_time() - began
print("\n".join(repr(float(total)) for total in n.sum(axis=(1, 2))))
print("seconds", seconds)
