/** The words options choose among. */
export const VALUES = {
  outcomeKinds: ["amount", "binary", "count"],
  exposureKinds: ["groups", "amount"],
  sets: ["each", "steps", "every"],
  variances: ["classical", "HC0", "HC1", "HC2", "HC3", "CR1", "CR2"],
  formats: ["text", "markdown", "json", "csv"],
} as const;

export type Format = (typeof VALUES.formats)[number];
