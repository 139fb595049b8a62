import "server-only";
import type { z } from "zod";
import { may, type Permission } from "@/lib/auth/access";
import { type Actor, requireActor } from "@/lib/auth/actor";
import { env } from "@/lib/env";
import { AppError, type ErrorCode } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { log, withRequest } from "@/lib/log";
import { readJson } from "./body";
import { clientAddress } from "./client-address";
import { parseInput } from "./fields";
import { asAppError, problemResponse } from "./problem";
import { countRequest, type Limit } from "./rate-limit";

type Method = "GET" | "POST" | "PUT" | "PATCH" | "DELETE";

type Parsed<Schema> = Schema extends z.ZodType ? z.output<Schema> : undefined;

export type RouteDoor = {
  method: Method;
  /** The permission asked of the actor, or "anyone" for the few doors before sign-in. */
  permission: Permission | "anyone";
  summary: string;
  params?: z.ZodType;
  query?: z.ZodType;
  body?: z.ZodType;
  response?: z.ZodType;
  status: number;
  problems: readonly ErrorCode[];
  /** Whether the description of the API speaks of it. */
  described: boolean;
};

type Definition<Access extends Permission | "anyone", Params, Query, Body> = {
  method: Method;
  permission: Access;
  summary: string;
  params?: Params;
  query?: Query;
  body?: Body;
  response?: z.ZodType;
  status?: 200 | 201 | 204;
  /** Problems beside the usual ones, for the API description. */
  problems?: readonly ErrorCode[];
  bodyBytes?: number;
  limit?: Limit;
  described?: boolean;
  /** A plain value becomes JSON; a Response (a file, say) goes out as it is. */
  handle: (input: {
    actor: Access extends "anyone" ? null : Actor;
    params: Parsed<Params>;
    query: Parsed<Query>;
    body: Parsed<Body>;
    request: Request;
  }) => Promise<unknown>;
};

type RouteContext = { params: Promise<Record<string, string | string[] | undefined>> };

const usualLimit: Limit = { most: 600, seconds: 60 };
const usualBodyBytes = 1024 * 1024;

/** Cookies are sent along by any page of the web, so a write must come from our own. */
function refuseForeignOrigin(request: Request): void {
  const origin = request.headers.get("origin");
  if (origin === null) {
    if (request.headers.get("sec-fetch-site") === "cross-site")
      throw new AppError("forbidden", "Cross-site write refused.");
    return;
  }
  const host = request.headers.get("x-forwarded-host") ?? request.headers.get("host");
  const allowed = [new URL(env().APP_URL).host, host];
  if (!URL.canParse(origin) || !allowed.includes(new URL(origin).host)) {
    throw new AppError("forbidden", "This came from another site and was refused.");
  }
}

function respond(value: unknown, door: RouteDoor): Response {
  if (value instanceof Response) return value;
  if (door.status === 204) return new Response(null, { status: 204 });
  // Outside production the description of the API is held against what is really answered.
  const body = env().NODE_ENV !== "production" && door.response ? door.response.parse(value) : value;
  return Response.json(body, { status: door.status, headers: { "cache-control": "no-store" } });
}

/**
 * Wraps one method of one API route: request id, origin, session, permission, rate limit, parsed input,
 * problem+json. The handler calls one service function and returns plain data.
 */
export function defineRoute<
  Access extends Permission | "anyone",
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
>(definition: Definition<Access, Params, Query, Body>) {
  const door: RouteDoor = {
    method: definition.method,
    permission: definition.permission,
    summary: definition.summary,
    params: definition.params,
    query: definition.query,
    body: definition.body,
    response: definition.response,
    status: definition.status ?? 200,
    problems: definition.problems ?? [],
    described: definition.described ?? true,
  };

  async function answer(request: Request, context: RouteContext): Promise<Response> {
    if (definition.method !== "GET") refuseForeignOrigin(request);
    const { permission } = definition;
    let actor: Actor | null = null;
    if (permission === "anyone") {
      await limitTo(
        `route:${clientAddress(request.headers)}`,
        definition.limit ?? { most: 120, seconds: 60 },
      );
    } else {
      actor = await requireActor(request.headers);
      if (!may(actor.role, permission)) {
        throw new AppError(
          "forbidden",
          "Your role in this shop does not include this. An owner can change that.",
        );
      }
      await limitTo(`route:${actor.memberId}`, definition.limit ?? usualLimit);
    }
    const params = definition.params ? parseParams(definition.params, await context.params) : undefined;
    const query = definition.query
      ? parseInput(definition.query, Object.fromEntries(new URL(request.url).searchParams))
      : undefined;
    const body = definition.body
      ? parseInput(definition.body, await readJson(request, definition.bodyBytes ?? usualBodyBytes))
      : undefined;
    const value = await definition.handle({
      actor: actor as Access extends "anyone" ? null : Actor,
      params: params as Parsed<Params>,
      query: query as Parsed<Query>,
      body: body as Parsed<Body>,
      request,
    });
    return respond(value, door);
  }

  async function handler(request: Request, context: RouteContext): Promise<Response> {
    const requestId = request.headers.get("x-request-id") ?? newId();
    return withRequest({ requestId }, async () => {
      const begun = performance.now();
      const response = await answer(request, context).catch((error: unknown) =>
        problemResponse(asAppError(error)),
      );
      response.headers.set("x-request-id", requestId);
      log().info(
        {
          method: request.method,
          path: new URL(request.url).pathname,
          status: response.status,
          ms: Math.round(performance.now() - begun),
        },
        "request",
      );
      return response;
    });
  }

  return Object.assign(handler, { door });
}

async function limitTo(key: string, limit: Limit): Promise<void> {
  const { allowed, retryAfterSeconds } = await countRequest(key, limit);
  if (!allowed) {
    throw new AppError("too-many-requests", `Too many requests. Try again in ${retryAfterSeconds} seconds.`, {
      retryAfterSeconds,
    });
  }
}

/** An id that is no id names no record: 404, like somebody else's. */
function parseParams<Schema extends z.ZodType>(schema: Schema, params: unknown): z.output<Schema> {
  const result = schema.safeParse(params);
  if (!result.success) throw new AppError("not-found", "There is nothing at this address.");
  return result.data;
}
