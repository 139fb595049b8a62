import { sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import type { Role } from "@/lib/auth/access";

export type Membership = {
  shopId: string;
  memberId: string;
  role: Role;
  customerId: string | null;
  memberName: string;
  shopName: string;
};

/** Asked before a shop is known, through a definer function: a person's own memberships and no more. */
export async function membershipsOf(db: Handle, personId: string): Promise<Membership[]> {
  const rows = await db.execute<Membership>(sql`
    select shop_id as "shopId", member_id as "memberId", role, customer_id as "customerId",
           member_name as "memberName", shop_name as "shopName"
      from memberships_of(${personId})`);
  return [...rows];
}
