# Every set, or a sample of them, with HC3 of the exposure: python3 peers.py numpy|statsmodels FILE K SETS; prints JSON.
import json
import sys
import time

import numpy as np
import pandas as pd

way, file, k, sets = sys.argv[1], sys.argv[2], int(sys.argv[3]), int(sys.argv[4])
started = time.perf_counter()
names = [f"x{j + 1}" for j in range(k)]
data = pd.read_csv(file, usecols=["y", "d", *names]).dropna()
design = np.column_stack([np.ones(len(data)), data["d"], *(data[name] for name in names)]).astype(float)
y = data["y"].to_numpy()
read = time.perf_counter() - started
which = sorted(set(int(round(s)) for s in np.linspace(0, 2**k - 1, sets)))


def by_numpy(columns):
    a = design[:, columns]
    b = np.linalg.lstsq(a, y, rcond=None)[0]
    e = y - a @ b
    z = a @ np.linalg.inv(a.T @ a)
    h = np.einsum("ij,ij->i", z, a)
    return float(np.sqrt(np.sum((z[:, 1] * e / (1 - h)) ** 2)))


def by_statsmodels(columns):
    import statsmodels.api as sm

    return float(sm.OLS(y, design[:, columns]).fit(cov_type="HC3").bse[1])


fit = {"numpy": by_numpy, "statsmodels": by_statsmodels}[way]
if way == "statsmodels":
    import statsmodels.api
fitting = time.perf_counter()
errors = [fit([0, 1] + [2 + j for j in range(k) if s >> j & 1]) for s in which]
done = time.perf_counter()
print(json.dumps({"read": 1000 * read, "perSet": 1000 * (done - fitting) / len(which), "sets": len(which), "first": errors[0]}))
