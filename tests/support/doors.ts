import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import { routes } from "@/app/api/v1/_routes";
import type { ActionResult } from "@/lib/doors/action-result";
import type { ActionDoor } from "@/lib/doors/define-action";
import { doorsOf } from "@/lib/doors/openapi";
import { root, sources } from "../architecture/sources";

export type RouteHandler = (
  request: Request,
  context: { params: Promise<Record<string, string>> },
) => Promise<Response>;

export type FoundRoute = {
  key: string;
  path: string;
  method: string;
  permission: string;
  handler: RouteHandler;
};

/** Every method of every route, as "GET /customers/{id}". */
export function allRoutes(): FoundRoute[] {
  return Object.entries(routes).flatMap(([path, module]) =>
    doorsOf(module).map(({ method, permission }) => ({
      key: `${method} ${path}`,
      path,
      method,
      permission,
      handler: module[method] as RouteHandler,
    })),
  );
}

export type FoundAction = {
  key: string;
  permission: ActionDoor["permission"];
  act: (input: unknown) => Promise<ActionResult<unknown>>;
};

/** Every exported server action, by its name. */
export async function allActions(): Promise<FoundAction[]> {
  const files = sources().filter((source) => /^\s*["']use server["']/.test(source.text));
  const found = await Promise.all(
    files.map(async ({ path: file }) => {
      const module: Record<string, unknown> = await import(path.join(root, file));
      return Object.values(module).flatMap((value) => {
        if (typeof value !== "function" || !("door" in value)) return [];
        const door = value.door as ActionDoor;
        return [{ key: door.name, permission: door.permission, act: value as unknown as FoundAction["act"] }];
      });
    }),
  );
  return found.flat();
}

/** What the build serves: route files and server actions, from its own manifests. */
export function builtDoors(): { routes: string[]; actions: number } {
  const folder = path.join(root, ".next", "server");
  const read = (name: string) => {
    const file = path.join(folder, name);
    if (!existsSync(file)) throw new Error(`${name} is missing: run the build first (npm test does)`);
    return JSON.parse(readFileSync(file, "utf8"));
  };
  const paths: Record<string, string> = read("app-paths-manifest.json");
  const references: { node: Record<string, unknown> } = read("server-reference-manifest.json");
  return {
    routes: Object.keys(paths).filter((name) => name.endsWith("/route")),
    actions: Object.keys(references.node).length,
  };
}
