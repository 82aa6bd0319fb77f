"""The second yardstick: the recursion in NumPy as a desk writes it, all factor values and dates side by side.

Started with the file of a case; answers each line on standard input with the nanoseconds of one run.
"""
import sys
import time

import numpy as np
from scipy.special import ndtr

case = np.fromfile(sys.argv[1])
names, dates, points, jobs = map(int, case[:4])
unit = case[4]
rest = iter(np.split(case[5:], np.cumsum([names, names * dates, points, points])))
amounts, thresholds, factors, weights, tail = rest
thresholds = thresholds.reshape(names, dates)


def run():
    at = 0
    for _ in range(jobs):
        rho, strikes = tail[at], tail[at + 2 : at + 2 + int(tail[at + 1])]
        at += 2 + len(strikes)
        rows = int(np.ceil(strikes.max()))
        law = np.zeros((rows, dates * points))
        law[0] = 1
        for amount, threshold in zip(amounts, thresholds):
            p = ndtr((threshold[:, None] - np.sqrt(rho) * factors) / np.sqrt(1 - rho)).ravel()
            step = int(amount + 1e-9)
            part = amount - step
            new = law * (1 - p)
            if step < rows:
                new[step:] += p * (1 - part) * law[: rows - step]
            if part > 1e-9 and step + 1 < rows:
                new[step + 1 :] += p * part * law[: rows - step - 1]
            law = new
        put = np.maximum(strikes[:, None] - np.arange(rows), 0) @ law
        put.reshape(len(strikes), dates, points) @ weights


for _ in sys.stdin:
    before = time.perf_counter_ns()
    run()
    print(time.perf_counter_ns() - before, flush=True)
