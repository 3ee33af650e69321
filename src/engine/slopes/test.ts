import type { SlopesTest } from "../comparison";
import { wald } from "../errors/wald";
import type { Finding } from "../findings";
import { marginBounds, within } from "../shift/word";
import { changesOf } from "./change";
import type { Changes } from "./change";
import { fitTrial } from "./fit";
import { holm } from "./holm";
import type { InteractionFit, SlopesInput } from "./types";

/** Changes below this share of the outcome's spread are rounding, where a fit is exact. */
const EXACT_CHANGE = 1e-9;

interface Trial {
  readonly modifier: string;
  readonly test: { statistic: number; df: [number, number]; p: number } | null;
  readonly changes: Changes;
  /** The fit is exact and the slopes differ in it: no p value, but no doubt either. */
  readonly exactly: boolean;
}

/** Tests every modifier of one set: Wald tests of all interaction columns, Holm over the modifiers, D, and the verdict of each. */
export function testSlopes(input: SlopesInput): {
  tests: SlopesTest[];
  findings: Finding[];
} {
  const findings: Finding[] = [];
  const trials = input.modifiers.map((modifier): Trial => {
    const interaction = fitTrial(input, modifier);
    const trial = tryModifier(input, modifier, interaction);
    const { setIndex: set } = input;
    if (!hasProducts(input, modifier, interaction)) findings.push({ code: "interaction-not-estimable", set, modifier });
    else if (trial.changes.noSharedRange) findings.push({ code: "no-shared-range", set, modifier });
    return trial;
  });
  const adjusted = holm(trials.map((t) => (t.exactly ? 0 : (t.test?.p ?? null))));
  const bounds = marginBounds(input.margin, input.outcomeForm);
  const tests = trials.map(({ modifier, test, changes, exactly }, i): SlopesTest => {
    const { largest } = changes;
    const inside = bounds !== null && changes.within(bounds);
    const found = largest !== null && adjusted[i] !== null && adjusted[i]! < input.alpha;
    const small = bounds !== null && largest !== null && within(largest.interval90, bounds);
    const verdict = found && !small ? "differ" : inside ? "agree" : "cannot tell";
    return {
      modifier,
      statistic: test?.statistic ?? null,
      df: test?.df ?? null,
      p: test?.p ?? null,
      pHolm: exactly ? null : adjusted[i],
      change: largest,
      verdict,
    };
  });
  return { tests, findings };
}

function tryModifier(input: SlopesInput, modifier: string, interaction: InteractionFit): Trial {
  const { design } = input;
  const { fit, cov } = interaction;
  const changes = changesOf(design, interaction, modifier);
  const exact = fit.residualSumOfSquares === 0;
  const products = design.interactions.get(modifier)!.columns.flat();
  const at = fit.columns.flatMap((column, i) => (products.includes(column) ? [i] : []));
  const unit = (i: number) => Float64Array.from(fit.columns, (_, k) => (k === i ? 1 : 0));
  const test = cov && !exact && at.length > 0 ? wald(design.frame, fit, cov, at.map(unit)) : null;
  const exactly =
    exact &&
    fit.residualDf > 0 &&
    changes.largest !== null &&
    Math.abs(changes.largest.estimate) > EXACT_CHANGE * spread(design.frame.outcome);
  return { modifier, test, changes, exactly };
}

function hasProducts({ design }: SlopesInput, modifier: string, { fit }: InteractionFit): boolean {
  return design.interactions
    .get(modifier)!
    .columns.flat()
    .some((column) => fit.columns.includes(column));
}

function spread(values: Float64Array): number {
  let largest = 0;
  for (const value of values) largest = Math.max(largest, Math.abs(value));
  return largest;
}
