import type { ReactNode } from "react";
import { SignOutButton } from "@/components/people/sign-out-button";
import { FindDialog } from "@/components/search/find-dialog";
import { Book } from "@/components/shell/book";
import { staffActor } from "@/lib/pages/page-actor";
import { roleWords } from "@/lib/people/role-words";
import { signOutAction } from "../(auth)/sign-out/actions";

const places = [
  { href: "/today", label: "Today", phone: true },
  { href: "/due", label: "Due" },
  { href: "/instruments", label: "Instruments", phone: true },
  { href: "/customers", label: "Customers", also: ["/sites"] },
  { href: "/visits", label: "Visits", phone: true },
  { href: "/shop", label: "Shop" },
];

/** The staff's book. A customer's sign-in is sent to its own pages. */
export default async function ShopLayout({ children }: { children: ReactNode }) {
  const actor = await staffActor();
  return (
    <Book
      items={places}
      find={{ href: "/find" }}
      account={{
        person: { name: actor.name, role: roleWords[actor.role] },
        shop: { name: actor.shopName },
        links: [{ href: "/shop/account", label: "Your account" }],
        signOut: <SignOutButton action={signOutAction} />,
      }}
    >
      {children}
      <FindDialog href="/find" />
    </Book>
  );
}
