import "server-only";
import { cookies, headers } from "next/headers";

/**
 * The request's headers with the cookies as they stand now. After an action that began a new session the
 * page is rendered in the same request, whose own cookie header still names the session that has ended.
 */
export async function presentHeaders(): Promise<Headers> {
  const present = new Headers(await headers());
  present.set("cookie", (await cookies()).toString());
  return present;
}
