/** Runs once in each server process, before its first request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { noteClientAddresses } = await import("./lib/doors/client-address");
  noteClientAddresses();
}
