import { figures } from "./figures.mjs";

/** States of the panel, as the host would send them. The sentences stand for the report's; the page only lays them out. */
const heads = { held: "held fixed", rows: "rows", difference: "difference (kWh per winter)", shift: "shift", word: "in a word" };
const axis = {
  low: -640,
  high: 420,
  ticks: [-400, -200, 0, 200, 400].map((at) => ({ at, text: at < 0 ? `−${-at}` : at > 0 ? `+${at}` : "0" })),
};
const signed = (value) => (value < 0 ? `−${-value}` : `+${value}`);

export function row(set, columns, estimate, more = {}) {
  const [low, high] = [estimate - 50, estimate + 50];
  const shift = estimate - 340;
  return {
    set,
    held: columns.join(", ") || "nothing",
    adjustedFor: columns,
    rows: "1,187",
    kind: "single",
    difference: `${signed(estimate)} (${signed(low)}, ${signed(high)})`,
    line: { kind: "interval", low, mid: estimate, high },
    shift: set === 0 ? "–" : `${signed(shift)} (${signed(shift - 40)}, ${signed(shift + 40)})`,
    word: set === 0 ? "–" : estimate < 0 ? "reverses" : "unclear",
    base: set === 0,
    reported: false,
    place: null,
    aloud: `${columns.join(" and ") || "nothing"} held fixed: ${estimate}`,
    ...more,
  };
}
const rows = () => [
  row(0, [], 340),
  row(1, ["floor_m2"], -198),
  row(2, ["tenure"], 318),
  row(3, ["floor_m2", "tenure"], -212, { reported: true }),
];
const block = (contrast = "full − none", list = rows(), strip = null) => ({ contrast, heads, axis, rows: list, strip });
const column = (name, kind = "number", reason = null) => ({
  name,
  kind,
  missing: 0,
  levels: kind === "number" ? null : 3,
  notOutcome: reason,
  notExposure: reason,
  notCovariate: reason,
});
const columns = [
  column("flat_id", "text", "differs in nearly every row"),
  column("retrofit", "category"),
  column("kwh"),
  column("floor_m2"),
  column("tenure", "category"),
  column("block", "category"),
  column("built"),
];

export function panel(more = {}, shown = {}, asked = {}) {
  const plan = {
    outcome: { column: "kwh", unit: "kWh per winter" },
    exposure: { column: "retrofit" },
    covariates: [{ column: "floor_m2" }, { column: "tenure" }],
    margin: 150,
    ...asked.plan,
  };
  return {
    file: "heating.csv",
    target: "file:///heating.csv",
    keptIn: { plan: null, note: null },
    status: { kind: "ready" },
    checking: false,
    filter: null,
    slopes: null,
    reading: { number: 7, at: new Date(Date.now() - 12_000).toISOString() },
    question: {
      plan,
      guessed: false,
      columns,
      levels: ["full", "none", "part"],
      reference: "none",
      kind: "groups",
      setsChoice: "each",
      setCount: 4,
      ...asked,
      ...{ plan },
    },
    presentation: {
      title: "heating.csv",
      facts: ["heating.csv", "1,187 of 1,204 rows complete", "errors HC3"],
      readout: [
        {
          text: "Holding floor_m2 and tenure fixed, kwh is 212 kWh per winter lower for retrofit = full than for none (95 % interval 160 to 264 lower).",
          tone: "headline",
        },
        { text: "Unadjusted it is 340 higher: the sign reverses (Simpson's paradox).", tone: "plain" },
        {
          text: "Not shown: that this is the same at every floor_m2; it may change by up to 190 kWh across it, more than 150.",
          tone: "caution",
        },
      ],
      blocks: [block()],
      joint: null,
      notes: [
        {
          code: "unreadable-cells",
          text: "3 cells of floor_m2 are not numbers and count as missing.",
          lines: [17, 212, 901],
          important: true,
        },
        { code: "thousands-marks", text: "The numbers of kwh are written with thousands marks.", lines: [], important: false },
      ],
      rows: "1,187 of 1,204 rows were used; left out: 17 without kwh.",
      provenance: ["HC3 standard errors"],
      summary: "Holding floor_m2 and tenure fixed, 212 kWh lower.",
      slopesSummary: "not shown to differ or agree for the reported set",
      ...shown,
    },
    ...more,
  };
}

/** 2 to the power of `count` sets, by estimate. */
export function many(count) {
  const names = Array.from({ length: count }, (_, i) =>
    i === 1 ? "annual_income_before_tax_of_the_household_in_pounds" : `covariate_${i + 1}`,
  );
  const items = Array.from({ length: 2 ** count }, (_, set) => {
    const holds = names.flatMap((_name, i) => ((set >> i) & 1 ? [i] : []));
    const mid = 300 - (600 * set) / 2 ** count;
    return {
      set,
      holds,
      kind: "single",
      difference: `${mid.toFixed(0)} exactly`,
      line: { kind: "interval", low: mid - 60, mid, high: mid + 60 },
    };
  });
  const list = [
    row(0, [], 340),
    row(5, names.slice(0, 3), 300, { place: "highest" }),
    row(9, names.slice(0, 2), -290, { place: "lowest" }),
    row(2 ** count - 1, names, -212, { reported: true }),
  ];
  return panel(
    {},
    { blocks: [block("full − none", list, { columns: names, items })] },
    { setsChoice: "every", setCount: 2 ** count },
  );
}

const HOSTILE = '<img src=x onerror="document.body.dataset.hacked=1">|`=cmd()\n# x';
const LONG = "weekly_heating_consumption_of_the_whole_dwelling_including_hot_water_and_the_stairwell_share_in_kwh";
const varies = row(1, ["floor_m2"], 0, {
  kind: "varies",
  difference: "no single difference: slopes differ in floor_m2",
  line: { kind: "span", low: -380, high: 190 },
  shift: "–",
  word: "–",
});
const none = row(2, ["tenure"], 0, {
  kind: "none",
  difference: "tenure tells retrofit apart completely",
  line: null,
  shift: "–",
  word: "–",
});
const amount = {
  kind: "amount",
  levels: [],
  reference: null,
  plan: { outcome: { column: "kwh" }, exposure: { column: "built", unit: "years", per: 10 }, covariates: [] },
};
const named = (name) =>
  panel(
    { file: `${name}.csv` },
    {
      blocks: [block(`${name} − none`, [row(0, [], 340), row(1, [name, `${name} 2`], -198, { reported: true })])],
      facts: [`${name}.csv`],
    },
    {
      columns: [column(name), column("b"), column("kwh")],
      plan: { outcome: { column: name, unit: "kWh" }, exposure: { column: "b" }, covariates: [{ column: name + " 2" }] },
    },
  );

export const STATES = {
  "two groups": panel(),
  "four groups": panel(
    {},
    {
      blocks: ["full − none", "part − none", "other − none"].map((name) => block(name)),
      joint: "The groups differ: F(3, 1,180) = 41.2, p < 0.001.",
    },
  ),
  amount: panel({}, { blocks: [block("per 10 built")] }, amount),
  varies: panel(
    {},
    { blocks: [block("full − none", [row(0, [], 340), varies, none, row(3, ["floor_m2", "tenure"], -212, { reported: true })])] },
  ),
  "nothing drawn": panel({}, { blocks: [{ ...block("full − none", [none]), axis: null }] }),
  "16 sets": many(4),
  "256 sets": many(8),
  "4096 sets": many(12),
  "60 columns": panel({}, {}, { columns: [...columns, ...Array.from({ length: 53 }, (_, i) => column(`reading_${i + 1}`))] }),
  "long names": named(LONG),
  "hostile names": named(HOSTILE),
  reading: panel({ status: { kind: "reading" }, question: null, presentation: null, reading: null }),
  updating: panel({ status: { kind: "updating", share: 0.4 } }),
  checking: panel(
    { checking: true },
    {
      blocks: [
        block(
          "full − none",
          rows().map((item) => ({ ...item, word: "checking" })),
        ),
      ],
    },
  ),
  missing: panel({ status: { kind: "missing", text: "heating.csv is not there any more." } }),
  unusable: panel({
    status: { kind: "unusable", text: "heating.csv, line 214: a quote is opened and never closed.", line: 214, inPlan: false },
  }),
  "nothing to compare": panel({ presentation: null }),
  ...Object.fromEntries(Object.entries(await figures()).map(([name, shown]) => [name, panel(shown)])),
};
