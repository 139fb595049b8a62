import { createHash, randomBytes } from "node:crypto";
import { v7 } from "uuid";

/** UUIDv7: made by whoever creates the record; sorts by time of creation. */
export function newId(): string {
  return v7();
}

/** An unguessable token for a link, and the hash under which it is stored. */
export function newToken(): { token: string; hash: string } {
  const token = randomBytes(32).toString("base64url");
  return { token, hash: hashToken(token) };
}

export function hashToken(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}
