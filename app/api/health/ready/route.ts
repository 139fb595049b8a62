import { databaseReady } from "@/lib/health";

export const dynamic = "force-dynamic";

export async function GET(): Promise<Response> {
  const ready = await databaseReady();
  return Response.json(
    { status: ready ? "ready" : "not-ready", database: ready ? "up" : "down" },
    { status: ready ? 200 : 503, headers: { "cache-control": "no-store" } },
  );
}
