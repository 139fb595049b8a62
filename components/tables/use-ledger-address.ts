"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { useCallback, useMemo } from "react";
import { type LedgerAddress, type LedgerShape, readAddress, writeAddress } from "./ledger-address";
import type { LedgerRow } from "./ledger-types";

export function useLedgerAddress<Row extends LedgerRow>(shape: LedgerShape<Row>) {
  const params = useSearchParams();
  const pathname = usePathname();
  const address = useMemo(() => readAddress(new URLSearchParams(params), shape), [params, shape]);

  const change = useCallback(
    (part: Partial<LedgerAddress>) => {
      // From the window rather than the last render: two quick changes must not undo each other.
      const next = writeAddress(new URLSearchParams(window.location.search), part, shape).toString();
      // The router follows the history; asking it to navigate would fetch the whole page for a list
      // that react-query fetches by itself.
      window.history.replaceState(null, "", next ? `${pathname}?${next}` : pathname);
    },
    [pathname, shape],
  );

  return { address, change };
}
