import type { SlopesChoice, SlopesSection } from "../../src/protocol";

/** What a person chose to look at, by what they read; null follows the comparison. Names outlive a change of the plan, places do not. */
export interface Wanted {
  readonly set: string | null;
  readonly modifier: string | null;
  readonly contrast: string | null;
}

export const NOTHING_WANTED: Wanted = { set: null, modifier: null, contrast: null };

export function readWanted(value: unknown): Wanted {
  const { set, modifier, contrast } = (typeof value === "object" && value !== null ? value : {}) as Record<string, unknown>;
  const text = (item: unknown) => (typeof item === "string" ? item : null);
  return { set: text(set), modifier: text(modifier), contrast: text(contrast) };
}

/** What is wanted, as a choice among what the section offers now; whatever it does not offer is left to the host. */
export function choiceOf(wanted: Wanted, section: SlopesSection | null): SlopesChoice {
  const contrast = wanted.contrast === null || !section ? -1 : section.contrasts.indexOf(wanted.contrast);
  return {
    set: section?.sets.find(({ label }) => label === wanted.set)?.index ?? null,
    modifier: wanted.modifier !== null && (!section || offers(section, wanted.modifier)) ? wanted.modifier : null,
    contrast: contrast < 0 ? null : contrast,
  };
}

/** Whether the section shows a choice already. */
export function shows(section: SlopesSection, { set, modifier, contrast }: SlopesChoice): boolean {
  return (
    (set === null || set === section.set) &&
    (modifier === null || modifier === section.modifier) &&
    (contrast === null || contrast === section.contrast)
  );
}

function offers({ modifiers }: SlopesSection, name: string): boolean {
  return modifiers.some((modifier) => modifier.name === name);
}
