import type { SlopesChoice, SlopesSection } from "../../src/protocol";
import type { View } from "../view";
import { choiceOf, shows } from "./wanted";

/** What the host was asked last, null after closing; undefined until the page has asked or seen that it need not. */
let asked: SlopesChoice | null | undefined;

/**
 * Asks the host for what the section is to show, whenever that is not what it was asked last: on opening and closing, after a choice, and when
 * another comparison has the wanted set or contrast in another place.
 * @param section the latest figure, which names the places
 */
export function askSlopes({ state, isOpen, wanted, post }: View, section: SlopesSection | null): void {
  const choice = isOpen("slopes") ? choiceOf(wanted(), section) : null;
  // the host still knows what was open when this page was hidden
  if (asked === undefined && (choice ? section && shows(section, choice) : !state.slopes)) asked = choice;
  if (JSON.stringify(asked) === JSON.stringify(choice)) return;
  asked = choice;
  post({ type: "slopes", choice });
}
