import { AppLink } from "@/components/ui/app-link";
import { addressLine } from "@/lib/sites/rules";
import type { SiteRow } from "@/lib/sites/schema";

/** A short list of sites inside another record's page. */
export function SiteLines({ sites, empty }: { sites: readonly SiteRow[]; empty: string }) {
  if (sites.length === 0) return <p className="text-ink-soft">{empty}</p>;
  return (
    <ul className="border-t border-edge!">
      {sites.map((site) => (
        <li key={site.id}>
          <AppLink
            href={`/sites/${site.id}`}
            className="grid min-h-11 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-hairline py-1.5 -outline-offset-2 hover:bg-cover"
          >
            <span className="truncate font-semibold">{site.name}</span>
            <span className="lab">
              {site.instruments === 1 ? "1 instrument" : `${site.instruments} instruments`}
            </span>
            <span className="lab col-span-2 truncate">{addressLine(site) || "No street yet"}</span>
          </AppLink>
        </li>
      ))}
    </ul>
  );
}
