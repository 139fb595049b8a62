import type { Metadata } from "next";
import { SheetsLedger } from "@/components/readings/sheets-ledger";
import { WorkHead } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { may } from "@/lib/auth/access";
import { parseInput } from "@/lib/doors/fields";
import { staffActor } from "@/lib/pages/page-actor";
import { sheetListQuery } from "@/lib/readings/schema";
import { findSheets } from "@/lib/readings/service";
import { shopClock } from "@/lib/shop-clock/service";
import { instrumentOf } from "../instrument-of";

export const metadata: Metadata = { title: "Reading sheets" };

type Props = PageProps<"/instruments/[id]/sheets">;

export default async function SheetsPage({ params, searchParams }: Props) {
  const actor = await staffActor();
  const instrument = await instrumentOf((await params).id);
  const asked = await searchParams;
  const archived = asked.archived === "only";
  const query = parseInput(sheetListQuery, {
    archived: archived ? "only" : "hide",
    ...(typeof asked.cursor === "string" ? { cursor: asked.cursor } : {}),
  });
  const [clock, page] = await Promise.all([shopClock(actor), findSheets(actor, instrument.id, query)]);
  const at = `/instruments/${instrument.id}/sheets`;
  const begin = may(actor.role, "sheets.change") ? (
    <LinkButton kind="primary" href={`${at}/new`}>
      New reading sheet
    </LinkButton>
  ) : null;
  return (
    <>
      <WorkHead
        title={archived ? "Archived sheets" : "Reading sheets"}
        summary="All readings taken at one stage of one visit."
        actions={
          <>
            <LinkButton kind="quiet" href={archived ? at : `${at}?archived=only`}>
              {archived ? "Sheets in use" : "Archived"}
            </LinkButton>
            {page.items.length > 0 ? begin : null}
          </>
        }
      />
      {page.items.length === 0 ? (
        <EmptyState
          title={archived ? "No archived sheets" : "No sheets yet"}
          action={archived ? null : begin}
        >
          {archived
            ? "Sheets that are put away stand here and can be restored."
            : "A sheet holds the partials of some notes as found, after a pitch raise, or as left."}
        </EmptyState>
      ) : (
        <SheetsLedger at={at} sheets={page.items} clock={clock} />
      )}
      {page.next ? (
        <p className="mt-4">
          <AppLink
            className="link"
            href={`${at}?${new URLSearchParams({ ...(archived ? { archived: "only" } : {}), cursor: page.next })}`}
          >
            Older sheets
          </AppLink>
        </p>
      ) : null}
    </>
  );
}
