import { PROTOCOL_VERSION } from "../src/protocol";
import type { HostMessage, PageMessage } from "../src/protocol";
import type { Kept } from "./state";

interface Api {
  postMessage(message: PageMessage): void;
  getState(): unknown;
  setState(state: Kept): void;
}
declare function acquireVsCodeApi(): Api;

type Body<M> = M extends unknown ? Omit<M, "v"> : never;
export type Post = (message: Body<PageMessage>) => void;

export interface Channel {
  readonly post: Post;
  readonly kept: () => unknown;
  readonly keep: (state: Kept) => void;
}

/** The page's end of the talk with the host, and the only place that knows the editor's API. Call once. */
export function openChannel(handle: (message: HostMessage) => void): Channel {
  const api = acquireVsCodeApi();
  window.addEventListener("message", (event: MessageEvent<unknown>) => {
    if (isHostMessage(event.data)) handle(event.data);
  });
  return {
    post: (message) => api.postMessage({ v: PROTOCOL_VERSION, ...message }),
    kept: () => api.getState(),
    keep: (state) => api.setState(state),
  };
}

function isHostMessage(data: unknown): data is HostMessage {
  if (typeof data !== "object" || data === null) return false;
  const { v, type, state, id, ok, text } = data as Record<string, unknown>;
  if (v !== PROTOCOL_VERSION) return false;
  if (type === "state") return typeof state === "object" && state !== null;
  const answer = type === "copied" || type === "saved";
  return answer && typeof id === "number" && typeof ok === "boolean" && typeof text === "string";
}
