import type { Plan } from "../../engine/plan";

/**
 * A plan's contents as one text, whatever its file's layout, comments and order of keys: plans with the same text ask the same question
 * for the same reasons. Its hash is the plan's fingerprint.
 */
export function planText(plan: Plan): string {
  return JSON.stringify(plan, (_, value: unknown) =>
    typeof value === "object" && value !== null && !Array.isArray(value)
      ? Object.fromEntries(Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1)))
      : value,
  );
}
