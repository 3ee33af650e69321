import { ORDER } from "./types";
import type { Order } from "./types";

/** In the order of kernels.wat. */
export const WHAT: readonly Order["what"][] = ["takeOut", "addLeverage", "leaf", "leafShift", "step", "stepShift"];

/** Writes orders into the buffer from `at` on. @returns the place after them */
export function writeOrders(w: Float64Array, at: number, orders: readonly Order[]): number {
  const integers = new Int32Array(w.buffer, w.byteOffset);
  orders.forEach(({ what, to, from, x, numbers, base, result }, i) => {
    const place = at + i * ORDER;
    integers.set([WHAT.indexOf(what), to, from, x], place * 2);
    w.set(numbers, place + 2);
    integers.set([base, result], (place + 8) * 2);
  });
  return at + orders.length * ORDER;
}
