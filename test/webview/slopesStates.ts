import { readTable } from "../../src/data/read";
import { compare } from "../../src/engine/compare";
import type { Plan } from "../../src/engine/plan";
import type { Presentation } from "../../src/report/presentation";
import { present } from "../../src/report/present";
import type { SlopesSection } from "../../src/report/slopes/presentation";
import { seeded } from "../engine/fixtures";
import { openData } from "../report/outputs";
import { CASES, sectionOf } from "../report/slopes/cases";
import type { Case } from "../report/slopes/cases";

const HOSTILE = '<img src=x onerror="document.body.dataset.hacked=1">&amp;</svg>]]>';
const LONG = "floor_area_of_the_dwelling_including_the_stairwell_share_and_the_unheated_cellar_in_square_metres";

/** Rows whose names and levels are whatever is given. */
function named(modifier: string, levels: readonly string[], outcome = "kwh"): Case {
  const { uniform, normal } = seeded(17);
  const quoted = (text: string) => `"${text.replaceAll('"', '""')}"`;
  const lines = Array.from({ length: 240 }, (_, i) => {
    const group = i % levels.length;
    const x = 40 + 100 * uniform() + 8 * group;
    return `${quoted(levels[group])},${x.toFixed(1)},${(2000 + 25 * x - group * 12 * (x - 90) + 200 * normal()).toFixed(0)}`;
  });
  const text = [`group,${quoted(modifier)},${quoted(outcome)}`, ...lines].join("\n");
  const read = readTable(new TextEncoder().encode(text), { file: "names.csv" });
  if (!read.ok) throw new Error(read.problem.code);
  const plan: Plan = {
    outcome: { column: outcome, unit: "kWh per winter" },
    exposure: { column: "group", reference: levels[0] },
    covariates: [{ column: modifier }],
  };
  return { table: read.table, plan };
}

const SHOWN: Readonly<Record<string, Case>> = {
  "slopes along a number": CASES["groups whose slopes differ"],
  "slopes of groups that share little": CASES["groups that share no range"],
  "slopes of three groups": CASES["three groups, the second contrast"],
  "slopes by a category": CASES["a category"],
  "slopes of one line": CASES["an amount with one slope"],
  "slopes of an amount": CASES["an amount whose slope changes"],
  "slopes along a logarithm": CASES["a logarithm of the modifier"],
  "slopes that are not drawn": CASES["a group without rows"],
  "slopes of six groups": named("floor_m2", ["none", "roof", "roof and walls", "windows", "windows and walls", "everything"]),
  "slopes of hostile names": named(HOSTILE, [HOSTILE, `${HOSTILE}2`], `${HOSTILE}3`),
  "slopes of long names": named(LONG, ["none", "retrofitted_completely_in_the_years_after_the_second_programme"], `${LONG}_2`),
  "slopes by long levels": {
    ...openData("birthwt", {
      outcome: { column: "bwt", unit: "g" },
      exposure: { column: "smoke", reference: 0 },
      covariates: [{ column: "race", form: "category", label: LONG }],
    }),
  },
};

/** Real figures with the presentation they belong to, by name. */
export function slopesShown(): Record<string, { slopes: SlopesSection; presentation: Presentation }> {
  return Object.fromEntries(
    Object.entries(SHOWN).map(([name, shown]) => {
      const comparison = compare(shown.table, shown.plan);
      return [name, { slopes: sectionOf(shown, comparison), presentation: present(comparison, shown.plan) }];
    }),
  );
}
