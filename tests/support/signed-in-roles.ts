import type { Role } from "@/lib/auth/access";
import { newId } from "@/lib/ids";
import { makeCustomer, owner } from "./factories";
import { type Browser, newBrowser, newPerson, newShop } from "./people";

/** One shop with somebody signed in, with a real session, in each role. */
export async function signedInRoles(): Promise<{
  shopId: string;
  customerId: string;
  browsers: Record<Role, Browser>;
}> {
  const { shopId, browser } = await newShop();
  const customerId = await makeCustomer(shopId);
  const join = async (role: Exclude<Role, "owner">): Promise<Browser> => {
    const person = await newPerson();
    await owner()`insert into member (shop_id, id, person_id, role, name, email, customer_id, bookable)
      values (${shopId}, ${newId()}, ${person.personId}, ${role}, ${role}, ${person.email},
        ${role === "customer" ? customerId : null}, ${role === "technician"})`;
    const joined = newBrowser();
    await joined.signIn(person.email);
    return joined;
  };
  return {
    shopId,
    customerId,
    browsers: {
      owner: browser,
      office: await join("office"),
      technician: await join("technician"),
      customer: await join("customer"),
    },
  };
}
