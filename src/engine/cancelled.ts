/** Thrown by the engine when the caller's `cancelled()` turned true; nothing has been changed. */
export class Cancelled extends Error {
  constructor() {
    super("cancelled");
    this.name = "Cancelled";
  }
}

/** @throws Cancelled when `cancelled()` is true. */
export function stopIf(cancelled?: () => boolean): void {
  if (cancelled?.()) throw new Cancelled();
}
