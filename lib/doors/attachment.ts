/** A file to keep: never shown inline, never guessed at by the browser. */
export function attachment({ name, type, text }: { name: string; type: string; text: string }): Response {
  return new Response(text, {
    headers: {
      "content-type": type,
      "content-disposition": `attachment; filename="${name.replace(/[^\w.-]/g, "_")}"`,
      "x-content-type-options": "nosniff",
      "cache-control": "no-store",
    },
  });
}
