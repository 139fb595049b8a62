/** The process runs and answers; asks nothing of anybody else. */
export function GET(): Response {
  return Response.json({ status: "live" }, { headers: { "cache-control": "no-store" } });
}
