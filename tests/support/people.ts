import { randomInt, randomUUID } from "node:crypto";
import postgres from "postgres";
import { type Actor, personFrom } from "@/lib/auth/actor";
import { auth } from "@/lib/auth/auth";
import { clientAddressHeader } from "@/lib/doors/client-address";
import { env } from "@/lib/env";
import { newId } from "@/lib/ids";
import { openShop } from "@/lib/people/opening/service";
import { signUpInvited } from "@/lib/people/sign-up/service";

export const goodPassword = "seven larches lean west";

/** As the owner of the tables, for what no service would do. */
export function ownerSql() {
  const url = process.env.TEST_DATABASE_URL;
  if (!url) throw new Error("TEST_DATABASE_URL is not set");
  return postgres(url, { max: 2, onnotice: () => {} });
}

/** Keeps cookies from answer to question, and comes from an address of its own. */
export function newBrowser(options: { address?: string; origin?: string } = {}) {
  const cookies = new Map<string, string>();
  const address = options.address ?? `10.${randomInt(256)}.${randomInt(256)}.${randomInt(256)}`;

  function headers(): Headers {
    const made = new Headers({
      origin: options.origin ?? env().APP_URL,
      "user-agent": "Test browser",
      [clientAddressHeader]: address,
    });
    if (cookies.size > 0)
      made.set("cookie", [...cookies].map(([name, value]) => `${name}=${value}`).join("; "));
    return made;
  }

  async function post(
    path: string,
    body: unknown,
  ): Promise<{ status: number; body: unknown; set: string[] }> {
    const requestHeaders = headers();
    requestHeaders.set("content-type", "application/json");
    const response = await auth().handler(
      new Request(`${env().APP_URL}/api/auth${path}`, {
        method: "POST",
        headers: requestHeaders,
        body: JSON.stringify(body),
      }),
    );
    const set = response.headers.getSetCookie();
    for (const line of set) {
      const [, name, value] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
      if (name === undefined || value === undefined) continue;
      if (/max-age=0/i.test(line)) cookies.delete(name);
      else cookies.set(name, value);
    }
    const isJson = /json/.test(response.headers.get("content-type") ?? "");
    return { status: response.status, body: isJson ? await response.json() : null, set };
  }

  const get = (path: string) =>
    auth().handler(new Request(`${env().APP_URL}/api/auth${path}`, { headers: headers() }));

  return {
    headers,
    post,
    get,
    cookies,
    signIn: (email: string, password = goodPassword) => post("/sign-in/email", { email, password }),
    async actor(): Promise<Actor> {
      const actor = (await personFrom(headers()))?.actor;
      if (!actor) throw new Error("Nobody is signed in to a shop here");
      return actor;
    },
  };
}

export type Browser = ReturnType<typeof newBrowser>;

export function newAddress(): string {
  return `p${randomUUID().slice(0, 12)}@example.org`;
}

/** Signed in once already, with a confirmed address, as whoever follows an invitation is. */
export async function newPerson(email = newAddress(), name = "Ida Farrow", password = goodPassword) {
  return signUpInvited(new Headers({ [clientAddressHeader]: "10.0.0.1" }), { name, email, password });
}

/** A shop of its own with its owner signed in. */
export async function newShop(shopName = "Larch and Wren") {
  const person = await newPerson();
  const { shopId } = await openShop(person, {
    shopId: newId(),
    shopName,
    country: "IE",
    timeZone: "Europe/Dublin",
    locale: "en-GB",
  });
  const browser = newBrowser();
  await browser.signIn(person.email);
  return { shopId, person, browser, owner: await browser.actor() };
}
