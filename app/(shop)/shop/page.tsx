import type { Metadata } from "next";
import { ShopFactsForm } from "@/components/people/shop-facts-form";
import { WorkHead } from "@/components/shell/spread";
import { may } from "@/lib/auth/access";
import { staffActor } from "@/lib/pages/page-actor";
import { builtInChoices } from "@/lib/plans/rules";
import { countryChoices, currencyChoices, timeZoneChoices } from "@/lib/shop/choices";
import { currencyCodes, locales } from "@/lib/shop/places";
import { getShopSettings } from "@/lib/shop/service";
import { changeShopAction } from "./actions";

export const metadata: Metadata = { title: "Shop" };

export default async function ShopPage() {
  const actor = await staffActor();
  const { shop, houseStyles } = await getShopSettings(actor);
  const canChange = may(actor.role, "shop.change");
  return (
    <>
      <WorkHead
        title="Facts about the shop"
        summary={
          canChange
            ? "What new customers, instruments and visits begin with."
            : "What new customers, instruments and visits begin with. An owner changes these."
        }
      />
      <ShopFactsForm
        key={shop.version}
        action={changeShopAction}
        shop={shop}
        canChange={canChange}
        countries={countryChoices()}
        currencies={currencyChoices(currencyCodes)}
        timeZones={timeZoneChoices()}
        locales={locales}
        styles={[...builtInChoices, ...houseStyles.map(({ id, name }) => ({ value: id, label: name }))]}
      />
    </>
  );
}
