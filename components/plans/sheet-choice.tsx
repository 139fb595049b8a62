"use client";

import type { Route } from "next";
import { usePathname, useRouter, useSearchParams } from "next/navigation";
import { Select } from "@/components/forms/select";

export type SheetOption = { id: string; label: string };

/** Which sheet the page is drawn from. The choice is in the address, so it can be sent and gone back to. */
export function SheetChoice({ sheets, value }: { sheets: readonly SheetOption[]; value: string }) {
  const router = useRouter();
  const pathname = usePathname();
  const search = useSearchParams();
  if (sheets.length < 2) return null;
  return (
    <Select
      label="Reading sheet"
      value={value}
      className="w-full sm:w-72"
      options={sheets.map(({ id, label }) => ({ value: id, label }))}
      onChange={(event) => {
        const params = new URLSearchParams(search);
        params.set("sheet", event.target.value);
        router.push(`${pathname}?${params}` as Route, { scroll: false });
      }}
    />
  );
}
