# One plan of the flagship as a practitioner would run it in NumPy: arrays over replicates, patches and classes, the generator's own
# samplers, and quantiles of the beta distribution from a table.
#   plan.py NUMBERS.json REPLICATES SEED: for each replicate 1 where few are left at some count, then seconds of processor time
import json
import sys
import time

import numpy as np

with open(sys.argv[1]) as file:
    given = json.load(file)
replicates, rng = int(sys.argv[2]), np.random.default_rng(int(sys.argv[3]))
start, births = np.array(given["start"], dtype=np.int64), np.array(given["births"])
P, C = start.shape
years, weights, threshold = given["years"], np.array(given["weights"]), given["threshold"]
survival = [np.array(table) for table in given["survival"]]
crowding = [np.array(row) for row in given["crowding"]]
ceiling = np.array(given["ceiling"], dtype=bool)
counted, leaving = np.array(given["counted"]), np.array(given["leaving"])
ways = [np.array(matrix) for matrix in given["ways"]]
across_rates = np.linalg.cholesky(np.array(given["betweenRates"]))
across_patches = np.linalg.cholesky(np.array(given["betweenPatches"]))
grid = np.linspace(given["from"], -given["from"], len(given["varied"][0]["quantiles"][0][0]))
varied = [(one["class"], [np.array(table) for table in one["quantiles"]]) for one in given["varied"]]
flood, move = given["flood"], given["move"]
reach, scaled = np.array(flood["reach"], dtype=bool), np.array(flood["multiplies"])
chunk = 2000

began = time.process_time()
few = np.zeros(replicates, dtype=bool)
for first in range(0, replicates, chunk):
    R = min(chunk, replicates - first)
    n = np.tile(start, (R, 1, 1))
    lowest = (n @ weights).sum(axis=1)
    for year in range(years):
        e = given["epoch"][year]
        n[:, :, 0] = rng.poisson((births * n).sum(axis=2))
        lives = np.tile(survival[e["survival"]], (R, 1, 1))
        normals = across_rates @ rng.standard_normal((R, len(varied), P)) @ across_patches.T
        for k, (c, tables) in enumerate(varied):
            table = tables[e["varied"]]
            for p in range(P):
                lives[:, p, c] = np.interp(normals[:, k, p], grid, table[p])
        N = n @ counted
        a = crowding[e["crowding"]]
        lives[:, :, 0] *= np.where(ceiling, np.minimum(1, a / np.maximum(N, 1)), 1 / (1 + a * N))
        struck = np.flatnonzero(rng.random(R) < flood["chance"])
        origins = rng.integers(P, size=len(struck))
        for c in range(C):
            lives[struck, :, c] *= np.where(reach[origins], scaled[c], 1)
        n = rng.binomial(n, lives)
        leavers = rng.binomial(n[:, :, 0], leaving)
        n[:, :, 0] -= leavers
        for p in range(P):
            n[:, :, 0] += rng.multinomial(leavers[:, p], ways[e["ways"]][p])[:, :-1]
        n[:, :, 2] += n[:, :, 1]
        n[:, :, 1] = n[:, :, 0]
        n[:, :, 0] = 0
        if move is not None and year in move["years"]:
            caught = np.minimum(n[:, move["from"], move["class"]], move["number"])
            n[:, move["from"], move["class"]] -= caught
            n[:, move["to"], move["class"]] += rng.binomial(caught, move["survival"])
        lowest = np.minimum(lowest, (n @ weights).sum(axis=1))
    few[first : first + R] = lowest < threshold
seconds = time.process_time() - began
print("\n".join(str(int(one)) for one in few))
print("seconds", seconds)
