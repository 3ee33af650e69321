/** Steps from end to end aimed at. */
const STEPS = 60;
/** Round steps within a power of ten. */
const ROUND = [1, 2, 2.5, 5, 10];

/**
 * About sixty even values between two ends, both among them: multiples of a round step, so that they can be said; even in logarithms, to three
 * digits, where `log`.
 * @param low below `high`; above 0 where `log`
 */
export function evenValues(low: number, high: number, log: boolean): number[] {
  const inner = log ? evenRatios(low, high) : multiples(low, high);
  const between = inner.filter((value, i) => value > low && value < high && (i === 0 || value > inner[i - 1]));
  return [low, ...between, high];
}

function multiples(low: number, high: number): number[] {
  const step = nearestRound((high - low) / STEPS);
  const [first, last] = [Math.ceil(low / step), Math.floor(high / step)];
  if (!Number.isFinite(step) || !(step > 0)) return [];
  // 12 digits: what a multiple of 0.1 carries beyond them is rounding
  return Array.from({ length: last - first + 1 }, (_, i) => Number(((first + i) * step).toPrecision(12)));
}

function nearestRound(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  const off = (m: number) => Math.abs(Math.log((m * power) / rough));
  return power * ROUND.reduce((best, m) => (off(m) < off(best) ? m : best));
}

function evenRatios(low: number, high: number): number[] {
  const [a, b] = [Math.log(low), Math.log(high)];
  return Array.from({ length: STEPS - 1 }, (_, i) => Number(Math.exp(a + ((b - a) * (i + 1)) / STEPS).toPrecision(3)));
}
