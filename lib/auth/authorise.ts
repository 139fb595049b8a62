import type { Actor } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import { type Permission, type Scope, scopeOf } from "./access";

/** The scope in which the actor may do this, or an error. Every service function begins with it. */
export function authorise(actor: Actor, permission: Permission): Exclude<Scope, "none"> {
  const scope = scopeOf(actor.role, permission);
  if (scope === "none") {
    throw new AppError(
      "forbidden",
      "Your role in this shop does not include this. An owner can change that.",
    );
  }
  return scope;
}
