import "server-only";
import { headers } from "next/headers";
import { unstable_rethrow } from "next/navigation";
import type { z } from "zod";
import { may, type Permission } from "@/lib/auth/access";
import { type Actor, requireActor } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { log, withRequest } from "@/lib/log";
import type { ActionResult } from "./action-result";
import { clientAddress } from "./client-address";
import { parseInput } from "./fields";
import { asAppError } from "./problem";
import { countRequest, type Limit } from "./rate-limit";

export type ActionDoor = { name: string; permission: Permission | "anyone" | "signed-in" };

type Definition<Access extends ActionDoor["permission"], Input extends z.ZodType, Output> = {
  /** Subject and verb, as "customers.archive": names the action in logs and in the role matrix. */
  name: string;
  /** "signed-in" is for a person who has no shop yet; "anyone" comes before sign-in. */
  permission: Access;
  input: Input;
  limit?: Limit;
  run: (actor: Access extends Permission ? Actor : null, input: z.output<Input>) => Promise<Output>;
};

/**
 * Wraps one server action. Actions are public POST endpoints: session, permission, rate limit and input are
 * checked inside, and expected errors are returned, never thrown at the page. Next itself refuses foreign origins.
 */
export function defineAction<Access extends ActionDoor["permission"], Input extends z.ZodType, Output>(
  definition: Definition<Access, Input, Output>,
) {
  const { name, permission } = definition;

  async function answer(requestHeaders: Headers, input: unknown): Promise<Output> {
    let actor: Actor | null = null;
    let limitKey = clientAddress(requestHeaders);
    if (permission !== "anyone" && permission !== "signed-in") {
      actor = await requireActor(requestHeaders);
      limitKey = actor.memberId;
      if (!may(actor.role, permission)) {
        throw new AppError(
          "forbidden",
          "Your role in this shop does not include this. An owner can change that.",
        );
      }
    }
    const counted = await countRequest(
      `action:${name}:${limitKey}`,
      definition.limit ?? { most: 240, seconds: 60 },
    );
    if (!counted.allowed) {
      throw new AppError("too-many-requests", `Too many tries. Wait ${counted.retryAfterSeconds} seconds.`);
    }
    return definition.run(
      actor as Access extends Permission ? Actor : null,
      parseInput(definition.input, input),
    );
  }

  async function action(input: unknown): Promise<ActionResult<Output>> {
    const requestHeaders = await headers();
    const requestId = requestHeaders.get("x-request-id") ?? newId();
    return withRequest({ requestId }, async () => {
      const begun = performance.now();
      let result: ActionResult<Output>;
      try {
        result = { ok: true, data: await answer(requestHeaders, input) };
      } catch (error) {
        unstable_rethrow(error);
        const { code, message, more } = asAppError(error);
        result = { ok: false, error: { code, message, fields: more.fields, current: more.current } };
      }
      log().info(
        {
          action: name,
          outcome: result.ok ? "ok" : result.error.code,
          ms: Math.round(performance.now() - begun),
        },
        "action",
      );
      return result;
    });
  }

  return Object.assign(action, { door: { name, permission } satisfies ActionDoor });
}
