import { Refusal } from "./refusal";
import { say } from "./sentences";

/** The input cannot be used. */
const UNUSABLE = 2;
/** The program itself is at fault (EX_SOFTWARE of sysexits.h): neither 1, which says something is stale, nor 2. */
const AT_FAULT = 70;

/** What stderr says of an exception, and the exit code. */
export function failure(error: unknown): { readonly text: string; readonly exitCode: number } {
  if (error instanceof Refusal) return { text: error.message, exitCode: UNUSABLE };
  // what the runtime throws where an array or a text of that size cannot be had
  if (error instanceof RangeError && /alloc|length|memory/i.test(error.message)) return { text: say.memory, exitCode: UNUSABLE };
  const detail = error instanceof Error ? (error.stack ?? error.message) : String(error);
  return { text: `${say.fault}\n${detail}`, exitCode: AT_FAULT };
}
