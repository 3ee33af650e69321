"""Expected values from statsmodels for test/reference/statsmodels.test.ts.

    python3 test/reference/make-statsmodels.py        from the project's folder
Needs Debian's python3-statsmodels and python3-pandas. A second opinion beside R: another language, another least-squares routine (the pseudo-inverse).
"""
import itertools
import json

import numpy
import pandas
import statsmodels
import statsmodels.api as sm

HERE = "test/reference"


def design(data, exposure, names):
    columns = {"const": numpy.ones(len(data)), exposure: data[exposure].astype(float)}
    for name in names:
        if data[name].dtype == object:
            for level in sorted(data[name].unique())[1:]:
                columns[f"{name}={level}"] = (data[name] == level).astype(float)
        else:
            columns[name] = data[name].astype(float)
    return pandas.DataFrame(columns)


def every(names):
    return [list(c) for r in range(len(names) + 1) for c in itertools.combinations(names, r)]


def case(file, outcome, exposure, covariates, kind, cluster=None):
    data = pandas.read_csv(f"{HERE}/data/{file}").dropna(subset=[outcome, exposure, *covariates] + ([cluster] if cluster else []))
    sets = []
    for names in every(covariates):
        model = sm.OLS(data[outcome], design(data, exposure, names))
        options = {"cov_type": "nonrobust" if kind == "classical" else kind}
        if kind == "CR1":
            options = {"cov_type": "cluster", "cov_kwds": {"groups": pandas.factorize(data[cluster])[0]}}
        fit = model.fit(use_t=True, **options)
        low, high = fit.conf_int().loc[exposure]
        sets.append({"adjustedFor": names, "estimate": repr(float(fit.params[exposure])), "standardError": repr(float(fit.bse[exposure])),
                     "low": repr(float(low)), "high": repr(float(high)), "p": repr(float(fit.pvalues[exposure]))})
    plan = {"outcome": {"column": outcome}, "exposure": {"column": exposure, "kind": "amount"}, "covariates": [{"column": c} for c in covariates],
            "sets": "every", "variance": kind}
    if cluster:
        plan["cluster"] = cluster
    return {"name": f"{file} {kind}", "file": file, "plan": plan, "sets": sets}


cases = [case("mtcars.csv", "mpg", "am", ["wt", "hp", "qsec", "drat"], kind) for kind in ["classical", "HC0", "HC1", "HC2", "HC3"]]
cases += [case("mtcars.csv", "mpg", "am", ["wt", "hp"], "CR1", "carb"), case("penguins.csv", "body_mass", "flipper", ["sex", "island", "beak_depth"], "HC3"),
          case("swiss.csv", "Fertility", "Education", ["Agriculture", "Catholic", "Infant.Mortality"], "HC2"),
          case("infert.csv", "age", "parity", ["spontaneous", "induced", "education"], "CR1", "stratum")]
made_by = {"statsmodels": statsmodels.__version__, "numpy": numpy.__version__, "pandas": pandas.__version__}
with open(f"{HERE}/expected/statsmodels.json", "w") as out:
    json.dump({"madeBy": made_by, "calls": "sm.OLS(...).fit(cov_type=..., use_t=True)", "cases": cases}, out, indent=1)
    out.write("\n")
