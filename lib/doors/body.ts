import { AppError } from "@/lib/errors";

/** The JSON body, never holding more than `mostBytes` in memory whatever the length header claims. */
export async function readJson(request: Request, mostBytes: number): Promise<unknown> {
  const type = request.headers.get("content-type") ?? "";
  if (!/^application\/json\b/i.test(type)) {
    throw new AppError("unsupported-type", "Send the body as application/json.");
  }
  const tooLarge = () =>
    new AppError(
      "too-large",
      `This is larger than ${Math.round(mostBytes / 1024)} kB. Send it in several parts; nothing was saved.`,
    );
  if (Number(request.headers.get("content-length") ?? 0) > mostBytes) throw tooLarge();
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body?.getReader();
  while (reader) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.byteLength;
    if (size > mostBytes) {
      await reader.cancel();
      throw tooLarge();
    }
    chunks.push(value);
  }
  try {
    return JSON.parse(Buffer.concat(chunks).toString("utf8"));
  } catch {
    throw new AppError("malformed", "The body is not valid JSON.");
  }
}
