"use client";

import { useState } from "react";
import { AppLink } from "@/components/ui/app-link";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { StateWord } from "@/components/ui/state-word";
import { type GoingOn, goTo } from "./go-to";

export type OwnShop = { shopId: string; shopName: string; role: string; current: boolean };

/** A person may belong to several shops and works in one at a time. */
export function ShopSwitch({ shops, action }: { shops: readonly OwnShop[]; action: GoingOn }) {
  const [busy, setBusy] = useState<string | null>(null);

  async function choose(shopId: string) {
    setBusy(shopId);
    const result = await action({ shopId }).catch(() => null);
    if (result?.ok) return goTo(result.data);
    setBusy(null);
    showMessage({
      kind: "attention",
      text: result?.error.message ?? "The server did not answer. Try again.",
    });
  }

  return (
    <>
      <ul className="border-t border-hairline">
        {shops.map(({ shopId, shopName, role, current }) => (
          <li
            key={shopId}
            className="flex min-h-11 flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-hairline py-2"
          >
            <div className="min-w-0">
              <div className="font-medium break-words">{shopName}</div>
              <div className="lab">{role}</div>
            </div>
            {current ? (
              <StateWord kind="done">open now</StateWord>
            ) : (
              <Button
                kind="quiet"
                busy={busy === shopId}
                aria-label={`Change to ${shopName}`}
                onClick={() => choose(shopId)}
              >
                Change to it
              </Button>
            )}
          </li>
        ))}
      </ul>
      <p className="mt-3">
        <AppLink href="/open-shop" className="link inline-flex items-center touch:min-h-11">
          Open another shop
        </AppLink>
      </p>
    </>
  );
}
