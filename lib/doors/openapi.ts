import { z } from "zod";
import { type ErrorCode, statusOfCode } from "@/lib/errors";
import type { RouteDoor } from "./define-route";

type RouteModule = Record<string, unknown>;

export type RouteMap = Record<string, RouteModule>;

const methods = ["GET", "POST", "PUT", "PATCH", "DELETE"] as const;

/** The doors of a route module, by method. Whatever else it exports is none. */
export function doorsOf(module: RouteModule): RouteDoor[] {
  return methods.flatMap((method) => {
    const handler = module[method];
    return typeof handler === "function" && "door" in handler ? [handler.door as RouteDoor] : [];
  });
}

function jsonSchema(schema: z.ZodType, io: "input" | "output") {
  const { $schema: _, ...plain } = z.toJSONSchema(schema, { io, unrepresentable: "any" });
  return plain;
}

function parameters(place: "path" | "query", schema: z.ZodType | undefined) {
  if (!schema) return [];
  const object = jsonSchema(schema, "input") as {
    properties?: Record<string, object>;
    required?: string[];
  };
  return Object.entries(object.properties ?? {}).map(([name, property]) => ({
    name,
    in: place,
    required: place === "path" || Boolean(object.required?.includes(name)),
    schema: property,
  }));
}

function problems(door: RouteDoor) {
  const codes = new Set<ErrorCode>(door.problems);
  codes.add("too-many-requests");
  if (door.permission !== "anyone") codes.add("signed-out").add("forbidden");
  if (door.params) codes.add("not-found");
  if (door.query || door.body) codes.add("invalid");
  if (door.body) codes.add("malformed").add("too-large").add("unsupported-type");
  const byStatus = new Map<number, ErrorCode[]>();
  for (const code of codes)
    byStatus.set(statusOfCode[code], [...(byStatus.get(statusOfCode[code]) ?? []), code]);
  return Object.fromEntries(
    [...byStatus]
      .sort(([one], [other]) => one - other)
      .map(([status, list]) => [
        String(status),
        {
          description: list.join(", "),
          content: { "application/problem+json": { schema: { $ref: "#/components/schemas/Problem" } } },
        },
      ]),
  );
}

function operation(path: string, door: RouteDoor) {
  const answer = door.response
    ? { content: { "application/json": { schema: jsonSchema(door.response, "output") } } }
    : {};
  return {
    operationId: `${door.method.toLowerCase()}${path.replace(/[^a-z0-9]+(.)?/gi, (_, next: string | undefined) => next?.toUpperCase() ?? "")}`,
    summary: door.summary,
    parameters: [...parameters("path", door.params), ...parameters("query", door.query)],
    ...(door.body
      ? {
          requestBody: {
            required: true,
            content: { "application/json": { schema: jsonSchema(door.body, "input") } },
          },
        }
      : {}),
    responses: {
      [String(door.status)]: { description: "Done", ...answer },
      ...problems(door),
    },
    ...(door.permission === "anyone" ? { security: [] } : {}),
    "x-permission": door.permission,
  };
}

const problemSchema = {
  type: "object",
  required: ["type", "title", "status", "detail", "code"],
  properties: {
    type: { type: "string", format: "uri-reference" },
    title: { type: "string" },
    status: { type: "integer" },
    detail: { type: "string", description: "What happened and what to do, in words that may be shown." },
    code: { type: "string", enum: Object.keys(statusOfCode) },
    requestId: { type: "string" },
    errors: {
      type: "array",
      items: {
        type: "object",
        required: ["path", "message"],
        properties: {
          path: { type: "string", examples: ["readings.3.hz"] },
          message: { type: "string" },
        },
      },
    },
    current: { description: "The record as it is now, where a stale version was sent." },
  },
};

/** OpenAPI 3.1 from the very schemas that validate. */
export function openApi(routes: RouteMap, serverUrl: string) {
  const paths: Record<string, Record<string, ReturnType<typeof operation>>> = {};
  for (const [path, module] of Object.entries(routes)) {
    const described = doorsOf(module).filter((door) => door.described);
    if (described.length === 0) continue;
    paths[path] = Object.fromEntries(
      described.map((door) => [door.method.toLowerCase(), operation(path, door)]),
    );
  }
  return {
    openapi: "3.1.0",
    info: {
      title: "Agraffe",
      version: "1",
      description:
        "The service book of a piano-tuning business. Cookie session; writes must come from the same origin; errors are RFC 9457 problem details.",
    },
    servers: [{ url: serverUrl }],
    security: [{ session: [] }],
    paths,
    components: {
      securitySchemes: { session: { type: "apiKey", in: "cookie", name: "agraffe.session_token" } },
      schemas: { Problem: problemSchema },
    },
  };
}
