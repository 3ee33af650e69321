import type * as vscode from "vscode";
import { PROTOCOL_VERSION } from "../protocol";
import type { HostMessage, PageMessage } from "../protocol";
import { isPageMessage } from "./valid";

type Body<M> = M extends unknown ? Omit<M, "v"> : never;

/** The host's end of the talk with one page: typed, versioned, and checked on the way in. The only place that posts to a page. */
export class Channel {
  constructor(
    private readonly webview: vscode.Webview,
    private readonly log: (text: string) => void,
  ) {}

  listen(handle: (message: PageMessage) => void): vscode.Disposable {
    return this.webview.onDidReceiveMessage((message: unknown) => {
      if (isPageMessage(message)) handle(message);
      else this.log("a message from the page was not understood");
    });
  }

  /** A hidden page loses it; the page asks for the whole state when it is shown again. */
  post(message: Body<HostMessage>): void {
    void Promise.resolve(this.webview.postMessage({ v: PROTOCOL_VERSION, ...message })).catch(() => undefined);
  }
}
