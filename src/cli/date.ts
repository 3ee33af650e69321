import { Refusal } from "./refusal";
import { say } from "./sentences";

/**
 * The date of a write-up as YYYY-MM-DD: the local day of `now`, or the UTC day of SOURCE_DATE_EPOCH (seconds; reproducible-builds.org)
 * where it is set.
 * @throws Refusal where SOURCE_DATE_EPOCH is no whole number of seconds that is a date
 */
export function dateOf(now: Date, epoch: string | undefined): string {
  if (epoch !== undefined && epoch !== "") {
    const date = new Date(/^\d+$/.test(epoch) ? Number(epoch) * 1000 : NaN);
    if (Number.isNaN(date.getTime())) throw new Refusal(say.badEpoch(epoch));
    return date.toISOString().slice(0, -14);
  }
  const two = (part: number) => String(part).padStart(2, "0");
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}
