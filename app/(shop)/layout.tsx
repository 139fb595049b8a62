import type { ReactNode } from "react";
import { signOutAction } from "@/app/(auth)/sign-out/actions";
import { SignOutButton } from "@/components/people/sign-out-button";
import { Book } from "@/components/shell/book";
import { currentPerson } from "@/lib/auth/actor";
import { roleWords } from "@/lib/people/role-words";

const places = [
  { href: "/today", label: "Today", phone: true },
  { href: "/visits", label: "Visits", phone: true },
  { href: "/instruments", label: "Instruments", phone: true },
  { href: "/customers", label: "Customers" },
  { href: "/shop", label: "Shop" },
];

/** The book around every page of the staff. Each page asks for itself who may see it; this only frames it. */
export default async function ShopBook({ children }: { children: ReactNode }) {
  const person = await currentPerson();
  // A customer's own account has the same page, without the staff's way round.
  if (!person?.actor || person.actor.role === "customer") return children;
  const { actor } = person;
  return (
    <Book
      items={places}
      account={{
        person: { name: actor.name, role: roleWords[actor.role] },
        shop: { name: actor.shopName },
        links: [
          { href: "/shop/account", label: "Your account" },
          ...(person.memberships.length > 1
            ? [{ href: "/shop/account#shops", label: "Change to another shop" }]
            : []),
        ],
        signOut: <SignOutButton action={signOutAction} size="small" />,
      }}
    >
      {children}
    </Book>
  );
}
