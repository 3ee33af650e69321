import type { PanelState, PlanChange } from "../src/protocol";
import type { Post } from "./channel";
import type { Wanted } from "./slopes/wanted";

/** What every section is given to draw itself. */
export interface View {
  readonly state: PanelState;
  readonly post: Post;
  readonly choose: (change: PlanChange) => void;
  /** Folded pieces. */
  readonly isOpen: (name: string) => boolean;
  readonly setOpen: (name: string, open: boolean) => void;
  /** What the Slopes section is to show. */
  readonly wanted: () => Wanted;
  readonly want: (change: Partial<Wanted>) => void;
  /** Copies the comparison and shows the host's answer beside the buttons. */
  readonly copy: (as: "markdown" | "table") => void;
}
