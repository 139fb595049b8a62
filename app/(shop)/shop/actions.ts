"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/doors/define-action";
import { shopChange } from "@/lib/shop/schema";
import { changeShop } from "@/lib/shop/service";

export const changeShopAction = defineAction({
  name: "shop.change",
  permission: "shop.change",
  input: shopChange,
  run: async (actor, change) => {
    const shop = await changeShop(actor, change);
    // The name and the way dates are written stand on every page.
    revalidatePath("/", "layout");
    return shop;
  },
});
