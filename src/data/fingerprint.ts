import { createHash } from "node:crypto";

/** Lower-case hex SHA-256 of the bytes: the identity of a file's contents. */
export function fingerprint(bytes: Uint8Array): string {
  return createHash("sha256").update(bytes).digest("hex");
}
