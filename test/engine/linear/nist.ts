interface Problem {
  readonly columns: Float64Array[];
  readonly outcome: Float64Array;
}

const column = (values: readonly number[]) => Float64Array.from(values);
const powers = (x: readonly number[], degree: number) =>
  Array.from({ length: degree + 1 }, (_, k) => column(x.map((v) => v ** k)));

const LONGLEY_ROWS: readonly (readonly number[])[] = [
  [60323, 61122, 60171, 61187, 63221, 63639, 64989, 63761, 66019, 67857, 68169, 66513, 68655, 69564, 69331, 70551],
  [830, 885, 882, 895, 962, 981, 990, 1000, 1012, 1046, 1084, 1108, 1126, 1142, 1157, 1169],
  [
    234289, 259426, 258054, 284599, 328975, 346999, 365385, 363112, 397469, 419180, 442769, 444546, 482704, 502601, 518173,
    554894,
  ],
  [2356, 2325, 3682, 3351, 2099, 1932, 1870, 3578, 2904, 2822, 2936, 4681, 3813, 3931, 4806, 4007],
  [1590, 1456, 1616, 1650, 3099, 3594, 3547, 3350, 3048, 2857, 2798, 2637, 2552, 2514, 2572, 2827],
  [
    107608, 108632, 109773, 110929, 112075, 113270, 115094, 116219, 117388, 118734, 120445, 121950, 123366, 125368, 127852,
    130081,
  ],
  [1947, 1948, 1949, 1950, 1951, 1952, 1953, 1954, 1955, 1956, 1957, 1958, 1959, 1960, 1961, 1962],
];

/** Employment on deflator (in tenths), GNP, unemployed, forces, population, year: R's datasets::longley in NIST's units. */
export const LONGLEY: Problem = {
  outcome: column(LONGLEY_ROWS[0]),
  columns: [new Float64Array(16).fill(1), column(LONGLEY_ROWS[1].map((v) => v / 10)), ...LONGLEY_ROWS.slice(2).map(column)],
};

/** Added to Wampler's polynomial in sets 3 to 5 (times 1, 100, 10,000): orthogonal to every power up to the fifth. From memory. */
const DELTA = [759, -2048, 2048, -2048, 2523, -2048, 2048, -2048, 1838, -2048, 2048];

/** Wampler's five sets: fifth-degree polynomials of 0 … 20 with coefficients 1, or 10⁻ᵏ in the second. */
export function wampler(number: 1 | 2 | 3 | 4 | 5): Problem & { certified: number[] } {
  const x = Array.from({ length: 21 }, (_, i) => i);
  const certified = Array.from({ length: 6 }, (_, k) => (number === 2 ? 10 ** -k : 1));
  const size = { 1: 0, 2: 0, 3: 1, 4: 100, 5: 10_000 }[number];
  // the second set's outcomes have five decimals at most: rounding them gives the doubles of the published figures
  const outcome = x.map((v, i) => {
    const value = certified.reduce((sum, c, k) => sum + c * v ** k, 0);
    return (number === 2 ? Number(value.toFixed(5)) : value) + size * DELTA[i <= 10 ? i : 20 - i];
  });
  return { columns: powers(x, 5), outcome: column(outcome), certified };
}

/**
 * Stands in for NIST's Filip, whose 82 rows could not be written down with certainty: the same size, degree and range (−8.78 to −3.13, from
 * memory), so the same condition of about 10¹⁵; the outcome is a smooth curve with a ripple.
 */
export const FILIP_SHAPE: Problem = (() => {
  const x = Array.from({ length: 82 }, (_, i) => -8.78 + (i * (8.78 - 3.13)) / 81);
  return { columns: powers(x, 10), outcome: column(x.map((v, i) => 0.85 + 0.05 * Math.sin(v) + 0.002 * Math.cos(7 * i))) };
})();
