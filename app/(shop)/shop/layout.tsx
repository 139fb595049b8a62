import type { ReactNode } from "react";
import { LeftPage, RightPage, Spread } from "@/components/shell/spread";
import { Tabs } from "@/components/shell/tabs";
import { DemoBadge } from "@/components/ui/demo-badge";
import { Facts } from "@/components/ui/facts";
import { staffActor } from "@/lib/pages/page-actor";
import { roleMeaning, roleWords } from "@/lib/people/role-words";
import { getShop } from "@/lib/shop/service";

/** The shop's settings and the person's own, on facing pages: who the shop is, and what can be changed. */
export default async function ShopSettingsLayout({ children }: { children: ReactNode }) {
  const actor = await staffActor();
  const shop = await getShop(actor);
  const regions = new Intl.DisplayNames("en-GB", { type: "region" });
  return (
    <Spread
      left={
        <LeftPage title={shop.name} subtitle="The shop" aside={shop.demo ? <DemoBadge /> : undefined}>
          <Facts
            facts={[
              { name: "Country", value: regions.of(shop.country) },
              { name: "Time zone", value: shop.timeZone.replaceAll("_", " ") },
              { name: "Currency", value: shop.currency },
              { name: "Pitch", value: `A4 = ${shop.referenceHz} Hz` },
            ]}
          />
          <Facts
            facts={[
              { name: "You", value: actor.name },
              { name: "Role", value: roleWords[actor.role] },
              { name: "May do", value: roleMeaning[actor.role] },
            ]}
          />
        </LeftPage>
      }
      right={
        <RightPage>
          <Tabs
            label="Shop"
            items={[
              { href: "/shop", label: "Facts", exact: true },
              { href: "/shop/team", label: "Team" },
              { href: "/shop/styles", label: "House styles" },
              { href: "/shop/account", label: "Your account" },
            ]}
          />
          {children}
        </RightPage>
      }
    />
  );
}
