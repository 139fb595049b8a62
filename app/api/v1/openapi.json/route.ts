import { defineRoute } from "@/lib/doors/define-route";
import { openApi } from "@/lib/doors/openapi";
import { env } from "@/lib/env";
import { routes } from "../_routes";

export const GET = defineRoute({
  method: "GET",
  permission: "anyone",
  summary: "This description",
  handle: async () => openApi(routes, `${env().APP_URL}/api/v1`),
});
