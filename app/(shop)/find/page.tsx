import type { Metadata } from "next";
import { Finder } from "@/components/search/finder";
import { LeftPage, RightPage, Spread } from "@/components/shell/spread";
import { staffActor } from "@/lib/pages/page-actor";

export const metadata: Metadata = { title: "Find" };

export default async function FindPage({ searchParams }: PageProps<"/find">) {
  await staffActor();
  const { q } = await searchParams;
  return (
    <Spread
      left={
        <LeftPage
          title="Find"
          subtitle="Customers, sites and instruments, by any part of a name, an address, a serial number or a telephone number."
          fold={null}
        />
      }
      right={
        <RightPage>
          <div className="mt-5 max-w-160">
            <Finder initial={typeof q === "string" ? q : ""} />
          </div>
        </RightPage>
      }
    />
  );
}
