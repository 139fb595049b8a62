import "server-only";
import { z } from "zod";
import { auth } from "@/lib/auth/auth";
import { openShopInput } from "@/lib/people/schema";

/** As long as the link in the mail works. */
const seconds = 24 * 60 * 60;

const kept = z.object({
  /** The hash of the token in the browser that signed up. */
  browser: z.string(),
  next: z.string().optional(),
  shop: openShopInput,
});

export type KeptSignUp = z.infer<typeof kept>;

const identifier = (personId: string) => `sign-up:${personId}`;

/** What was typed on signing up beside the person, until their address is confirmed. */
export async function keepSignUp(personId: string, value: KeptSignUp): Promise<void> {
  const { internalAdapter } = await auth().$context;
  await internalAdapter.createVerificationValue({
    identifier: identifier(personId),
    value: JSON.stringify(value),
    expiresAt: new Date(Date.now() + seconds * 1000),
  });
}

function read(row: { value: string; expiresAt: Date } | null): KeptSignUp | null {
  return row && row.expiresAt > new Date() ? kept.parse(JSON.parse(row.value)) : null;
}

export async function keptSignUp(personId: string): Promise<KeptSignUp | null> {
  const { internalAdapter } = await auth().$context;
  return read(await internalAdapter.findVerificationValue(identifier(personId)));
}

/** For one caller only, and gone after. */
export async function takeSignUp(personId: string): Promise<KeptSignUp | null> {
  const { internalAdapter } = await auth().$context;
  return read(await internalAdapter.consumeVerificationValue(identifier(personId)));
}

/** The cookie in which the browser that signed up keeps its token. */
export async function signUpCookie() {
  const { name, attributes } = (await auth().$context).createAuthCookie("sign_up", { maxAge: seconds });
  const { secure = false, path = "/", maxAge = seconds } = attributes;
  return { name, options: { secure, path, maxAge, httpOnly: true, sameSite: "lax" as const } };
}
